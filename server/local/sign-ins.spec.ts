import { describe, expect, it } from '@jest/globals';
import { signInLines, signInsFrom } from './sign-ins.mjs';

const officer = { role: 'Safety officer', email: 'officer@marrow-slate.example', password: 'one-two' };
const lead = { role: 'Lead', email: 'lead@marrow-slate.example', password: 'three-four' };

describe('signInsFrom', () => {
  it('finds the sign-ins among log lines', () =>
    expect(signInsFrom(['{"msg":"seeding"}', 'plain words', JSON.stringify({ signIns: [officer, lead] }), '{"msg":"done"}', '{"half', ''].join('\n'))).toEqual([officer, lead]));

  it.each(['', 'plain words', '{"msg":"done"}', '{"signIns":"none"}'])('finds none in %p', (printed) => expect(signInsFrom(printed)).toEqual([]));
});

it('prints them in straight columns', () =>
  expect(signInLines([officer, lead])).toEqual(['  Safety officer  officer@marrow-slate.example  one-two', '  Lead            lead@marrow-slate.example     three-four']));
