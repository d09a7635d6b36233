import { Deliveries, type Receipt, type TabletDay } from '#shared/envelopes';

interface Answer {
  readonly status: number;
  readonly body: unknown;
}

/** The office's side of the wire, in memory: takes what tablets send, once each, and answers as the contract says. Replaces fetch. */
export class Office {
  readonly delivered: { readonly id: string; readonly bytes: string }[] = [];
  readonly pinChecks: string[] = [];
  requests = 0;
  /** Answers everything with this instead, with `problem` as its body. */
  status = 200;
  problem: unknown = null;
  /** Takes what comes, and the answer never arrives. */
  loseAnswers = false;
  /** A delivery with this envelope is refused as a whole. */
  spoiled = '';
  /** An envelope the answer does not name. */
  unanswered = '';
  day: TabletDay | null = null;
  /** Sheet files by revision id. */
  readonly files = new Map<string, string>();
  /** What a PIN check is answered with. */
  pinAnswer: Answer = { status: 204, body: null };

  constructor() {
    Object.defineProperty(globalThis, 'fetch', { value: this.fetch.bind(this), configurable: true, writable: true });
  }

  private async fetch(path: string, request: { readonly body: string | null }): Promise<unknown> {
    this.requests += 1;
    const file = this.files.get(/^\/api\/tablet\/sheets\/([^/]+)\/file$/.exec(path)?.[1] ?? '');
    if (file !== undefined && this.status === 200) return { ok: true, status: 200, arrayBuffer: async () => new TextEncoder().encode(file).buffer };
    const answer = this.status === 200 ? this.answer(path, request.body) : { status: this.status, body: this.problem };
    if (this.loseAnswers) throw new TypeError('network changed');
    const text = JSON.stringify(answer.body);
    return { ok: answer.status < 300, status: answer.status, text: async () => text, json: async () => JSON.parse(text) as unknown };
  }

  private answer(path: string, body: string | null): Answer {
    if (path === '/api/tablet/deliveries') return this.take(body);
    if (path === '/api/tablet/day') return { status: 200, body: this.day };
    if (path !== '/api/tablet/pin-checks') return { status: 404, body: null };
    this.pinChecks.push(body ?? '');
    return this.pinAnswer;
  }

  private take(body: string | null): Answer {
    const { envelopes } = Deliveries.parse(JSON.parse(body ?? ''));
    if (envelopes.some(({ id }) => id === this.spoiled)) return { status: 422, body: { type: 'about:blank', title: 'Not understood.', status: 422 } };
    const receipts = envelopes.map(({ id, bytes }): Receipt => {
      const isKnown = this.delivered.some((one) => one.id === id);
      if (!isKnown) this.delivered.push({ id, bytes });
      return { id, outcome: isKnown ? 'duplicate' : 'recorded', acknowledgementId: null, entryIndex: null, pinState: null, isUnwitnessed: false, isSuperseded: false, note: null };
    });
    return { status: 200, body: { receivedAt: '2026-12-03T12:00:10Z', receipts: receipts.filter(({ id }) => id !== this.unanswered) } };
  }
}
