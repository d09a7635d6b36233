import { describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { type EndpointName } from '#shared/endpoints';
import { roleMay } from './access';
import { requestOf } from './contract-request';

describe('who may do what, from the contract itself', () => {
  it.each<[Role, EndpointName, boolean]>([
    ['safety-officer', 'signBasis', true],
    ['crew-lead', 'publishShift', true],
    ['crew-lead', 'signBasis', false],
    ['crew-lead', 'editPerson', false],
    ['auditor', 'editShiftPlan', false],
    ['auditor', 'listHistory', true],
    ['owner', 'setLogin', true],
    // A tablet's own doors are nobody's who is signed in.
    ['owner', 'deliver', false],
  ])('%s, %s: %s', (role, name, may) => {
    expect(roleMay(role, name)).toBe(may);
  });
});

describe('a request from the contract', () => {
  it('fills the path, escapes it, and carries the version an edit saw', () => {
    const { url, method, headers } = requestOf('publishShift', { params: { shiftId: 'a/b' }, version: 7 });
    expect({ url, method, headers }).toEqual({ url: '/api/shifts/a%2Fb/publication', method: 'POST', headers: { 'If-Match': '"7"' } });
  });

  it('leaves empty filters out of the query', () => {
    expect(requestOf('listJobs', { query: { q: undefined, isOpen: 'true' } }).params.toString()).toBe('isOpen=true');
  });
});
