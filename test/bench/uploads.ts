import { v7 as newId } from 'uuid';
import { type Database } from '#server/platform/database';
import { hashPassword } from '#server/session/passwords';
import { buildDemoSheet, demoSheets } from '#test/support/demo-sheets';
import { buildServer, freePort, startProcess, until, untilReady, type ServiceProcess } from '#test/support/processes';
import { ownOrigin, startService } from '#test/support/service';
import { withServices } from './services';

/** As many as a browser opens to one server. */
const CONNECTIONS = 6;

export interface Uploading {
  readonly process: ServiceProcess;
  /** Sends sheets nobody sent before and comes back when all of them are stored. */
  upload(count: number): Promise<void>;
  /** Comes back when the worker has read all that was sent. */
  untilAllRead(): Promise<void>;
  /** One page of the library, as its page asks for it; milliseconds. */
  list(): Promise<number>;
}

/** The built service, web and worker in one process, with an officer signed in. */
export function whileUploading<T>(changes: Record<string, string>, work: (uploading: Uploading) => Promise<T>): Promise<T> {
  return withServices(async () => {
    const inside = await startService();
    const built = await buildServer();
    try {
      const email = await makeOfficer(inside.deps.database);
      const service = startProcess(built, 'both', { ...inside.environment, ...changes }, await freePort());
      try {
        await untilReady(service);
        return await work(await uploadingTo(service, email));
      } finally {
        await service.kill();
      }
    } finally {
      built.remove();
      await inside.stop();
    }
  });
}

const password = 'plaster brass terrazzo';
/** An organisation of one person, who may do what the bench does. */
async function makeOfficer(database: Database): Promise<string> {
  const [organisationId, personId] = [newId(), newId()];
  const email = `${personId}@marrowslate.example`;
  const hash = await hashPassword(password);
  await database.inOrganisation(organisationId, async ({ client }) => {
    await client.query('INSERT INTO organisations (organisation_id, name) VALUES ($1, $2)', [organisationId, 'Marrow & Slate Floors']);
    await client.query(`INSERT INTO people (organisation_id, id, name, language) VALUES ($1, $2, 'Ines Halloran', 'en')`, [organisationId, personId]);
    await client.query(`SELECT door_set_login($1, $2, 'safety-officer', $3)`, [personId, email, hash]);
  });
  return email;
}

async function uploadingTo(service: ServiceProcess, email: string): Promise<Uploading> {
  const signedIn = await fetch(`${service.url}/api/session`, { method: 'POST', headers: { Origin: ownOrigin, 'Content-Type': 'application/json' }, body: JSON.stringify({ email, password }) });
  const cookie = signedIn.headers.getSetCookie().map((each) => each.split(';')[0]).join('; ');
  const headers = { Origin: ownOrigin, Cookie: cookie };
  const kinds = await Promise.all(demoSheets.map((spec) => buildDemoSheet(spec)));
  let sent = 0;

  const uploadOne = async (): Promise<void> => {
    const number = (sent += 1);
    const form = new FormData();
    // A remark after the end of a PDF makes it another file and no other sheet.
    form.append('file', new Blob([kinds[number % kinds.length] ?? '', `\n% ${number}\n`] as BlobPart[], { type: 'application/pdf' }), `sheet-${number}.pdf`);
    const response = await fetch(`${service.url}/api/sheets`, { method: 'POST', headers, body: form });
    if (response.status !== 202) throw new Error(`Upload ${number} answered ${response.status}: ${await response.text()}`);
    await response.arrayBuffer();
  };
  const ask = async (query: string): Promise<{ items: unknown[] }> => {
    const response = await fetch(`${service.url}/api/sheets?${query}`, { headers });
    if (!response.ok) throw new Error(`The list answered ${response.status}.`);
    return (await response.json()) as { items: unknown[] };
  };
  return {
    process: service,
    async upload(count) {
      let left = count;
      await Promise.all(Array.from({ length: CONNECTIONS }, async () => {
        while ((left -= 1) >= 0) await uploadOne();
      }));
    },
    untilAllRead: () => until('reading all sheets', async () => {
      await new Promise((resolve) => setTimeout(resolve, 200));
      return (await ask('state=waiting&limit=1')).items.length === 0;
    }, 300_000),
    async list() {
      const start = performance.now();
      await ask('limit=50');
      return performance.now() - start;
    },
  };
}
