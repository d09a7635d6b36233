import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { ShiftEditor } from './shift-editor';
import { shiftFixture, shiftIds } from './shift-fixture';
import { moveAssignment } from './shift-plan';

const planUrl = `/api/shifts/${shiftIds.shift}/plan`;
/** Lets promises that wait for an answer go on. */
const turn = () => new Promise((resolve) => setTimeout(resolve));

describe('a shift being planned', () => {
  let editor: ShiftEditor;
  let server: HttpTestingController;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), ShiftEditor] });
    editor = TestBed.inject(ShiftEditor);
    server = TestBed.inject(HttpTestingController);
    const loaded = editor.load(shiftIds.shift);
    server.expectOne(`/api/shifts/${shiftIds.shift}`).flush(shiftFixture());
    await loaded;
  });

  const dragTo = (endMinute: number) => editor.change((plan) => moveAssignment(plan, shiftIds.task, 0, 420, endMinute));
  const person = () => editor.answer()?.people[0];

  it('answers a drag at once, before anything is sent', () => {
    expect(person()?.table1Minutes).toBe(120);
    expect(person()?.maskRuleChangesAtMinute).toBeNull();
    dragTo(720);
    expect(person()?.table1Minutes).toBe(300);
    // Table 1 changes its respirator beyond four hours a shift: 29 CFR 1926.1153(c)(1), Table 1, column heads.
    expect(person()?.maskRuleChangesAtMinute).toBe(660);
    server.expectNone(planUrl);
    expect(editor.saveState()).toBe('waiting');
  });

  it('saves under the version it saw, and never two saves at a time', async () => {
    dragTo(600);
    const first = editor.flush();
    dragTo(660);
    const others = [editor.flush(), editor.flush()];
    await turn();
    const sent = server.expectOne(planUrl);
    expect(sent.request.headers.get('If-Match')).toBe('"4"');
    sent.flush(shiftFixture({ version: 5, plan: sent.request.body }));
    await turn();
    const second = server.expectOne(planUrl);
    expect(second.request.headers.get('If-Match')).toBe('"5"');
    expect(second.request.body.tasks[0].assignments[0].endMinute).toBe(660);
    second.flush(shiftFixture({ version: 6, plan: second.request.body }));
    expect(await Promise.all([first, ...others])).toEqual([true, true, true]);
    expect(editor.saveState()).toBe('saved');
    server.verify();
  });

  it('keeps what was typed when the server is away, and sends it when asked again', async () => {
    dragTo(600);
    const failed = editor.flush();
    server.expectOne(planUrl).error(new ProgressEvent('error'), { status: 0 });
    expect(await failed).toBe(false);
    expect(editor.saveState()).toBe('failed');
    expect(editor.plan()?.tasks[0]?.assignments[0]?.endMinute).toBe(600);
    const again = editor.flush();
    await turn();
    server.expectOne(planUrl).flush(shiftFixture({ version: 5 }));
    expect(await again).toBe(true);
  });

  it('shows both versions after a conflict; keeping mine saves over the newer version', async () => {
    dragTo(600);
    const refused = editor.flush();
    server.expectOne(planUrl).flush({ type: 'about:blank', title: 'Changed meanwhile', status: 412, current: shiftFixture({ version: 9 }) }, { status: 412, statusText: 'Precondition Failed' });
    expect(await refused).toBe(false);
    expect(editor.saveState()).toBe('conflict');
    expect(editor.theirs()?.version).toBe(9);
    const kept = editor.keepMine();
    await turn();
    const sent = server.expectOne(planUrl);
    expect(sent.request.headers.get('If-Match')).toBe('"9"');
    expect(sent.request.body.tasks[0].assignments[0].endMinute).toBe(600);
    sent.flush(shiftFixture({ version: 10, plan: sent.request.body }));
    expect(await kept).toBe(true);
  });

  it('takes what is stored when the person chooses it', async () => {
    dragTo(600);
    const refused = editor.flush();
    server.expectOne(planUrl).flush({ type: 'about:blank', title: 'Changed meanwhile', status: 412, current: shiftFixture({ version: 9 }) }, { status: 412, statusText: 'Precondition Failed' });
    await refused;
    editor.takeTheirs();
    expect(editor.plan()).toEqual(shiftFixture().plan);
    expect(editor.saveState()).toBe('saved');
  });
});
