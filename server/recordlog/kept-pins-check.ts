import { createHash } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { pinSetText } from '#shared/pin-sealing';
import { type Config } from '../config';
import { openSeal } from '../people/pin-judging';
import { isSamePinDigest, pinDigest } from '../people/pin-digest';
import { type Tx } from '../platform/database';

type KeptPin = { readonly personId: string; readonly name: string; readonly digest: string; readonly isAsRecorded: boolean; readonly envelope: string | null };

/**
 * The PINs that signatures are judged by, held against the list of PINs (which the log vouches for): a PIN that was reset,
 * a proof or an expiry that was changed, and a digest that is not of what the tablet sent. Null when all agree. PINs of
 * before the list was kept stand in no entry and are passed over.
 */
export async function findFalsePin(tx: Tx, keys: Config['keys']): Promise<string | null> {
  const { rows } = await tx.execute<KeptPin>(sql`
    SELECT p.person_id AS "personId", e.person_name AS name, p.digest,
      coalesce(e.event = 'set' AND e.proof = p.proof AND e.at = p.set_at AND e.tablet_id IS NOT DISTINCT FROM p.tablet_id, false) AS "isAsRecorded",
      convert_from(d.bytes, 'UTF8') AS envelope
    FROM pins p
    JOIN LATERAL (SELECT * FROM pin_events e WHERE e.organisation_id = p.organisation_id AND e.person_id = p.person_id AND e.event IN ('set', 'reset') ORDER BY e.entry_index DESC LIMIT 1) e ON true
    LEFT JOIN deliveries d ON d.organisation_id = e.organisation_id AND d.id = e.delivery_id
    WHERE p.organisation_id = ${tx.organisationId}`);
  const other = rows.find((row) => !row.isAsRecorded || !isOfEnvelope(tx.organisationId, keys, row));
  if (other) return `The PIN of ${other.name} is not the one that the list of PINs records as set last.`;
  const { rows: starts } = await tx.execute<{ name: string }>(sql`
    SELECT coalesce(e.person_name, s.person_id::text) AS name
    FROM start_pins s
    LEFT JOIN LATERAL (SELECT * FROM pin_events e WHERE e.organisation_id = s.organisation_id AND e.person_id = s.person_id AND (e.event <> 'set' OR e.proof = 'office') ORDER BY e.entry_index DESC LIMIT 1) e ON true
    LEFT JOIN recordlog_records r ON r.organisation_id = e.organisation_id AND r.index = e.entry_index
    WHERE s.organisation_id = ${tx.organisationId}
      AND NOT coalesce(e.event = 'start-pin-given' AND abs(extract(epoch FROM e.at - s.given_at)) < 60 AND e.by_person_id = s.given_by AND e.by_name = s.given_by_name AND (r.bytes IS NULL OR (convert_from(r.bytes, 'UTF8')::jsonb->>'expiresAt')::timestamptz = s.expires_at), false)
    LIMIT 1`);
  return starts[0] ? `The start PIN of ${starts[0].name} is not the one that the list of PINs records as given last.` : null;
}

/** What the tablet sealed gives the digest that is kept. True where the seal was made for a key that is no longer held. */
function isOfEnvelope(organisationId: string, keys: Config['keys'], { personId, digest, envelope }: KeptPin): boolean {
  if (envelope === null) return true;
  const { sealedPin, nonce } = JSON.parse(envelope) as { sealedPin: string; nonce: string };
  const pin = openSeal(keys, { sealedPin, nonce }, createHash('sha256').update(pinSetText(personId)).digest('hex'));
  return pin === undefined || isSamePinDigest(digest, pinDigest(keys.pinPepper, organisationId, personId, pin));
}
