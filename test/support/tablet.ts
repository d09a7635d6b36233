import { createHash, randomBytes } from 'node:crypto';
import { v7 as newId } from 'uuid';
import { type Receipt, type Receipts } from '#shared/envelopes';
import { type PublishedVersion } from '#shared/jobs';
import { answersText, sealPin } from '#shared/pin-sealing';
import { pinPublicKeySpki } from '#server/people/pin-unsealing';
import { ok, type Agent } from './call';
import { pageAgent, type Organisation } from './organisation';

/** What a seal for setting a PIN stands for: SHA-256 of "pin-set" and its owner (shared/pin-sealing.ts). */
export const pinSetHash = (ownerPersonId: string): string => sha256(`pin-set ${ownerPersonId}`);
export const strokes = [{ points: [{ x: 1, y: 2, time: 0 }, { x: 9, y: 5.5, time: 16, pressure: 0.4 }] }];

export interface SentEnvelope {
  readonly id: string;
  readonly bytes: string;
}
type Content = Readonly<Record<string, unknown>>;
type Answers = readonly { lineId: string; answer: 'yes' | 'no'; note: string | null }[];
const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');

/** A paired tablet that writes envelopes as the tablet's page does. */
export class TestTablet {
  sequence = 0;
  constructor(
    readonly organisation: Organisation,
    readonly id: string,
    readonly name: string,
    readonly agent: Agent,
    private readonly sealingKey: string,
  ) {}

  async seal(pin: string, textHash: string): Promise<{ sealedPin: string; nonce: string }> {
    const nonce = randomBytes(16).toString('hex');
    return { sealedPin: await sealPin({ pin, textHash, nonce }, this.sealingKey), nonce };
  }
  /** An envelope of any kind; `content` may replace every field. */
  envelope(kind: string, content: Content): SentEnvelope {
    const id = newId();
    const capturedAt = this.organisation.service.clock.now().toISOString();
    const bytes = JSON.stringify({ format: 'kneeboard-envelope/1', id, capturedAt, sequence: (this.sequence += 1), kind, ...content });
    return { id, bytes };
  }
  async signed(version: PublishedVersion, personId: string, { pin = '2468', ...content }: Content & { pin?: string } = {}): Promise<SentEnvelope> {
    const asked = version.asked.find((each) => each.personId === personId);
    const language = asked?.language ?? 'en';
    const textSha256 = textOf(version, language);
    return this.envelope('signed', { versionId: version.id, language, textSha256, personId, strokes, ...(await this.seal(pin, textSha256)), ...content });
  }
  couldNotSign(version: PublishedVersion, personId: string, content: Content = {}): SentEnvelope {
    const language = version.asked.find((each) => each.personId === personId)?.language ?? 'en';
    return this.envelope('could-not-sign', { versionId: version.id, language, textSha256: textOf(version, language), personId, reason: 'missing-gear', note: null, ...content });
  }
  async briefing(version: PublishedVersion, personId: string, answers: Answers, { pin = '2468', ...content }: Content & { pin?: string } = {}): Promise<SentEnvelope> {
    return this.envelope('briefing', { versionId: version.id, personId, answers, ...(await this.sealAnswers('briefing', version, null, answers, pin)), ...content });
  }
  async startCheck(version: PublishedVersion, personId: string, taskId: string, answers: Answers, { pin = '2468', ...content }: Content & { pin?: string } = {}): Promise<SentEnvelope> {
    return this.envelope('start-check', { versionId: version.id, personId, taskId, answers, ...(await this.sealAnswers('start-check', version, taskId, answers, pin)), ...content });
  }
  private sealAnswers(kind: string, version: PublishedVersion, taskId: string | null, answers: Answers, pin: string) {
    return this.seal(pin, sha256(answersText(kind, version.id, taskId, answers)));
  }
  /** Nobody vouches, unless `content` says who. */
  async pinSet(personId: string, pin: string, content: Content = {}): Promise<SentEnvelope> {
    return this.envelope('pin-set', { personId, ...(await this.seal(pin, pinSetHash(personId))), witnessPersonId: null, ...content });
  }

  /** Sets a PIN with a start PIN from the office: from here on it proves. */
  async setPin(personId: string, pin = '2468'): Promise<void> {
    const { pin: startPin } = await ok(this.organisation.officer.agent, 'giveStartPin', { params: { personId } });
    const receipt = await this.deliver(await this.pinSet(personId, pin, await this.started(personId, startPin)));
    if (receipt.outcome !== 'recorded') throw new Error(`the PIN was not set: ${receipt.note}`);
  }
  async started(personId: string, startPin: string): Promise<Content> {
    const { sealedPin, nonce } = await this.seal(startPin, pinSetHash(personId));
    return { startSealedPin: sealedPin, startNonce: nonce };
  }
  async witnessedBy(witnessPersonId: string, pin: string, ownerPersonId: string): Promise<Content> {
    const { sealedPin, nonce } = await this.seal(pin, pinSetHash(ownerPersonId));
    return { witnessPersonId, witnessSealedPin: sealedPin, witnessNonce: nonce };
  }

  deliverAll(envelopes: readonly SentEnvelope[], sentAt = this.organisation.service.clock.now()): Promise<Receipts> {
    return ok(this.agent, 'deliver', { body: { sentAt: sentAt.toISOString(), envelopes } });
  }
  async deliver(envelope: SentEnvelope): Promise<Receipt> {
    return (await this.deliverAll([envelope])).receipts[0] as Receipt;
  }
}

const textOf = (version: PublishedVersion, language: string): string => version.texts.find((text) => text.language === language)?.sha256 ?? '';

export async function pairTablet(organisation: Organisation, name: string): Promise<TestTablet> {
  const { service } = organisation;
  const { code, tablet } = await ok(organisation.owner.agent, 'addTablet', { body: { name } });
  const agent = pageAgent(service, organisation.address);
  await ok(agent, 'pairTablet', { body: { code } });
  return new TestTablet(organisation, tablet.id, name, agent, pinPublicKeySpki(service.deps.config.keys.pinSealingKey));
}
