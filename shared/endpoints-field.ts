import { Acknowledgement, HistoryExportQuery, HistoryPage, HistoryQuery, RecordCheck } from './acknowledgements';
import { ActionsQuery, AssignAction, CorrectiveAction, ResolveAction } from './actions';
import { PageQuery, pageOf, type Role } from './common';
import { type Endpoint } from './endpoints';
import { CheckPin, Deliveries, Receipts, TabletDay } from './envelopes';
import { PairTablet, PairedTablet } from './tablets';
import { KeptAside } from './today';

const everyone: readonly Role[] = ['owner', 'safety-officer', 'crew-lead', 'auditor'];
const officer: readonly Role[] = ['safety-officer'];
const officerOrLead: readonly Role[] = ['safety-officer', 'crew-lead'];
/** The history is the auditor's, the officer's and the owner's; a lead sees the signing state of a shift on its page. */
const historians: readonly Role[] = ['owner', 'safety-officer', 'auditor'];

export const actionEndpoints = {
  listActions: { method: 'GET', path: '/api/corrective-actions', access: everyone, query: ActionsQuery, answer: pageOf(CorrectiveAction) },
  assignAction: { method: 'PUT', path: '/api/corrective-actions/:actionId/owner', access: officerOrLead, body: AssignAction, answer: CorrectiveAction, needsVersion: true },
  resolveAction: { method: 'POST', path: '/api/corrective-actions/:actionId/resolution', access: officerOrLead, body: ResolveAction, answer: CorrectiveAction, needsVersion: true },
  listKeptAside: { method: 'GET', path: '/api/deliveries/kept-aside', access: officer, query: PageQuery, answer: pageOf(KeptAside) },
} as const satisfies Record<string, Endpoint>;

export const acknowledgementEndpoints = {
  listHistory: { method: 'GET', path: '/api/acknowledgements', access: historians, query: HistoryQuery, answer: HistoryPage },
  exportHistory: { method: 'GET', path: '/api/acknowledgements.csv', access: historians, query: HistoryExportQuery, answer: 'bytes' },
  readAcknowledgement: { method: 'GET', path: '/api/acknowledgements/:acknowledgementId', access: historians, answer: Acknowledgement },
  checkRecord: { method: 'POST', path: '/api/recordlog/check', access: historians, answer: RecordCheck },
  exportRecord: { method: 'GET', path: '/api/recordlog/export', access: historians, answer: 'bytes' },
  exportEntry: { method: 'GET', path: '/api/acknowledgements/:acknowledgementId/receipt', access: historians, answer: 'bytes' },
} as const satisfies Record<string, Endpoint>;

export const tabletDoorEndpoints = {
  pairTablet: { method: 'POST', path: '/api/tablet/pairing', access: 'public', body: PairTablet, answer: PairedTablet },
  readTabletDay: { method: 'GET', path: '/api/tablet/day', access: 'tablet', answer: TabletDay },
  checkPin: { method: 'POST', path: '/api/tablet/pin-checks', access: 'tablet', body: CheckPin, answer: 'nothing' },
  deliver: { method: 'POST', path: '/api/tablet/deliveries', access: 'tablet', body: Deliveries, answer: Receipts },
  readTabletSheet: { method: 'GET', path: '/api/tablet/sheets/:revisionId/file', access: 'tablet', answer: 'bytes' },
} as const satisfies Record<string, Endpoint>;
