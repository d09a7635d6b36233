import { HttpErrorResponse } from '@angular/common/http';
import { FormControl, FormGroup } from '@angular/forms';
import { describe, expect, it } from '@jest/globals';
import { SignIn } from '#shared/session';
import { fieldMessage, parseForm } from './form-schema';
import { problemOf, showFieldProblems } from './problem';

describe('what went wrong, in words', () => {
  it('is what the server said, also when its body came as text', () => {
    const body = { type: 'about:blank', title: 'Somebody changed this job after you opened it.', status: 409 };
    expect(problemOf(new HttpErrorResponse({ status: 409, error: body }))).toEqual(body);
    expect(problemOf(new HttpErrorResponse({ status: 409, error: JSON.stringify(body) }))).toEqual(body);
  });

  it.each([0, 502, 504])('is "cannot be reached" for status %i', (status) => {
    expect(problemOf(new HttpErrorResponse({ status }))).toMatchObject({ status: 0, title: 'Kneeboard cannot be reached.' });
  });

  it('names the status when the answer is no problem document, and never throws', () => {
    expect(problemOf(new HttpErrorResponse({ status: 500, error: '<html>' })).detail).toContain('500');
    expect(problemOf('anything').status).toBe(-1);
  });
});

describe('messages on fields', () => {
  const form = () => new FormGroup({ email: new FormControl('', { nonNullable: true }), password: new FormControl('', { nonNullable: true }) });

  it('come from the server by path, and what finds no field is handed back', () => {
    const group = form();
    const left = showFieldProblems(group, {
      type: 'about:blank',
      title: 'Not valid',
      status: 400,
      errors: [
        { path: 'email', message: 'Unknown address.' },
        { path: 'other', message: 'Something else.' },
      ],
    });
    expect(fieldMessage(group.controls.email.errors)).toBe('Unknown address.');
    expect(group.controls.email.touched).toBe(true);
    expect(left).toEqual(['Something else.']);
  });

  it("come from the contract's own schema before anything is sent", () => {
    const group = form();
    expect(parseForm(group, SignIn)).toBeNull();
    expect(fieldMessage(group.controls.email.errors)).toBe('Write an e-mail address.');
    expect(fieldMessage(group.controls.password.errors)).toBe('Fill this in.');
    group.setValue({ email: 'ines@marrow-slate.example', password: 'a long enough one' });
    expect(parseForm(group, SignIn)).toEqual({ email: 'ines@marrow-slate.example', password: 'a long enough one' });
  });
});
