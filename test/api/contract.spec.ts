import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { v7 as newId } from 'uuid';
import { endpoints, type Endpoint, type EndpointName } from '#shared/endpoints';
import { roles, type Role } from '#shared/common';
import { call, expectProblem, pathOf, readAnswer, type Agent } from '#test/support/call';
import { examples, type Example } from '#test/support/examples';
import { pageAgent } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { names, placesIn } from '#test/support/spoil';
import { makeWorld, storedRows, type World } from '#test/support/world';

/** Every row of the contract, tried the same way. A new row without an example in test/support/examples.ts fails here. */
const table = Object.entries(endpoints) as [EndpointName, Endpoint][];
const rows = (fits: (endpoint: Endpoint) => boolean): EndpointName[] => table.filter(([, endpoint]) => fits(endpoint)).map(([name]) => name);
const isForPeople = ({ access }: Endpoint): boolean => Array.isArray(access);
const hasJsonBody = ({ body }: Endpoint): boolean => body !== undefined && body !== 'file';

/** Longer than any text field takes, shorter than the largest request. */
const huge = 'x'.repeat(500_000);
/** Fields whose text is hashed or opened and never stored as text. */
const neverStored = /(?:^|\.)(?:password|current|next|code|sealedPin|nonce|bytes)$/;
/** The reader's rule: a control character, half a character pair, an override of the text's direction. */
const hostileTexts = { 'a NUL': 'Dov\u0000', 'a bell': 'Dov\u0007', 'half a surrogate pair': 'Dov\ud800', 'a right-to-left override': 'Dov\u202elas' };

let service: Service;
let own: World;
let other: World;
const stored = storedRows();
beforeAll(async () => {
  service = await startService();
  [own, other] = [await makeWorld(service), await makeWorld(service)];
});
afterAll(async () => {
  await stored.end();
  await service.stop();
});

/** More than any list takes, in less than the largest request. */
const manyOf = (item: unknown): unknown[] => Array.from({ length: Math.min(6_000, Math.floor(900_000 / (JSON.stringify(item).length + 1))) }, () => item);
const agentFor = ({ access }: Endpoint): Agent => (access === 'public' ? pageAgent(service) : access === 'tablet' ? own.tablet.agent : own.organisation.signedIn[(access as readonly Role[])[0] as Role].agent);
const example = async (name: EndpointName): Promise<Example & { agent: Agent }> => {
  const made = await examples[name](own);
  return { ...made, agent: made.agent ?? agentFor(endpoints[name]) };
};
const snapshot = () => stored.of([own.organisation.id, other.organisation.id]);
const tablets = () => [own.tablet.agent, other.tablet.agent];

it('has an example for every row, and no row twice', () => {
  expect(Object.keys(examples).sort()).toEqual(table.map(([name]) => name).sort());
  expect(new Set(table.map(([, { method, path }]) => `${method} ${path}`)).size).toBe(table.length);
});

describe.each(rows(() => true))('%s', (name) => {
  it('takes a good request and keeps its contract', async () => {
    const { agent, ...input } = await example(name);
    const before = service.faults.length;
    const response = await call(agent, name, input);
    expect({ name, status: response.status, body: response.status >= 300 ? response.body : 'good' }).toMatchObject({ status: expect.any(Number), body: 'good' });
    readAnswer(name, response);
    expect(service.faults.slice(before)).toEqual([]);
  });
});

describe.each(rows((endpoint) => endpoint.access !== 'public'))('%s', (name) => {
  it('answers 401 without a session, and the same with a strange one', async () => {
    const { agent: _, ...input } = await example(name);
    const before = await snapshot();
    const stranger = pageAgent(service);
    expectProblem(await call(stranger, name, input), 401);
    void stranger.set('Cookie', `kneeboard_session=s%3A${newId()}.signature; kneeboard_tablet=${'A'.repeat(43)}`);
    expectProblem(await call(stranger, name, input), 401);
    expect(await snapshot()).toEqual(before);
  });
});

describe.each(rows(isForPeople))('%s', (name) => {
  const { access } = endpoints[name];
  const outside = roles.filter((role) => !(access as readonly Role[]).includes(role));

  it(outside.length === 0 ? 'is open to every role' : `answers 403 to ${outside.join(', ')}`, async () => {
    const { agent: _, ...input } = await example(name);
    const before = await snapshot();
    for (const role of outside) expectProblem(await call(own.organisation.signedIn[role].agent, name, input), 403);
    expect(await snapshot()).toEqual(before);
    if (endpoints[name].method === 'GET') for (const role of access as readonly Role[]) expect([role, (await call(own.organisation.signedIn[role].agent, name, input)).status]).toEqual([role, 200]);
  });

  it('does not take a tablet for a person', async () => {
    const { agent: _, ...input } = await example(name);
    for (const tablet of tablets()) expectProblem(await call(tablet, name, input), 401);
  });
});

describe.each(rows(({ access }) => access === 'tablet'))('%s', (name) => {
  it('does not take a person for a tablet', async () => {
    const { agent: _, ...input } = await example(name);
    for (const role of roles) expectProblem(await call(own.organisation.signedIn[role].agent, name, input), 401);
  });
});

describe.each(rows(({ path }) => path.includes(':')))('%s', (name) => {
  it("does not find another organisation's thing, nor one that nobody has, nor a name that is no id", async () => {
    const { agent, ...input } = await example(name);
    const params = Object.keys(input.params ?? {});
    expect(params).toEqual([...endpoints[name].path.matchAll(/:(\w+)/g)].map((found) => found[1]));
    const before = await snapshot();
    for (const param of params)
      for (const wrong of [param === 'language' ? 'fr' : other.ids[param], param === 'language' ? 'EN' : newId(), 'no-id', '..%2f..', "1' OR '1'='1", 'x'.repeat(2000)]) {
        const refused = expectProblem(await call(agent, name, { ...input, params: { ...input.params, [param]: wrong ?? '' } }), 404);
        expect(refused.current).toBeUndefined();
      }
    expect(await snapshot()).toEqual(before);
  });
});

describe.each(rows(hasJsonBody))('%s', (name) => {
  it("refuses another organisation's id wherever the body holds one", async () => {
    const { agent, ...input } = await example(name);
    const nameOf = new Map(Object.entries(own.ids).map(([key, id]) => [id, key]));
    const places = placesIn(input.body).filter(({ value }) => nameOf.has(String(value)) && String(value).length > 2);
    const before = await snapshot();
    for (const place of places) {
      const response = await call(agent, name, { ...input, body: place.with(other.ids[nameOf.get(String(place.value)) ?? '']) });
      expect({ place: place.path, status: response.status }).toEqual({ place: place.path, status: expect.any(Number) });
      expect([400, 404, 422]).toContain(response.status);
      expect(JSON.stringify(response.body)).not.toContain(other.organisation.id);
    }
    expect(await snapshot()).toEqual(before);
  });

  it('refuses a body that lacks a field, has one too many or of another type, and names it', async () => {
    const { agent, ...input } = await example(name);
    const send = async (body: unknown, place: string) => {
      const { errors } = expectProblem(await call(agent, name, { ...input, body }), 400);
      expect({ place, errors, isNamed: place === '' || names(errors, place) }).toMatchObject({ isNamed: true });
    };
    const before = await snapshot();
    await send({}, Object.keys(input.body as object)[0] ?? '');
    for (const key of Object.keys(input.body as object)) await send(Object.fromEntries(Object.entries(input.body as object).filter(([each]) => each !== key)), key);
    for (const place of placesIn(input.body)) {
      const isObject = typeof place.value === 'object' && place.value !== null && !Array.isArray(place.value);
      if (isObject) await send(place.with({ ...(place.value as object), surprise: 1 }), place.path ? `${place.path}.surprise` : 'surprise');
      if (place.path !== '') await send(place.with(isObject || Array.isArray(place.value) ? 'text' : { nested: [true] }), place.path);
    }
    expect(await snapshot()).toEqual(before);
  });

  it('refuses what is far too much: huge text, numbers and lists', async () => {
    const { agent, ...input } = await example(name);
    const before = await snapshot();
    for (const { path, value, with: put } of placesIn(input.body)) {
      const tooMuch = typeof value === 'string' ? [huge] : typeof value === 'number' ? [1e308, -1e308] : Array.isArray(value) && value.length > 0 ? [manyOf(value[0])] : [];
      for (const wrong of tooMuch) {
        const { errors } = expectProblem(await call(agent, name, { ...input, body: put(wrong) }), 400);
        expect({ path, errors, isNamed: names(errors, path) }).toMatchObject({ isNamed: true });
      }
    }
    expect(await snapshot()).toEqual(before);
  });

  it.each(Object.entries(hostileTexts))('refuses text with %s wherever text would be stored', async (_, text) => {
    const { agent, ...input } = await example(name);
    const before = await snapshot();
    for (const place of placesIn(input.body).filter(({ path, value }) => typeof value === 'string' && !neverStored.test(path))) {
      const { errors } = expectProblem(await call(agent, name, { ...input, body: place.with(text) }), 400);
      expect({ path: place.path, errors, isNamed: names(errors, place.path) }).toMatchObject({ isNamed: true });
    }
    expect(await snapshot()).toEqual(before);
  });

  it('refuses a day or an instant that no calendar of the database has', async () => {
    const { agent, ...input } = await example(name);
    for (const place of placesIn(input.body).filter(({ value }) => typeof value === 'string' && /^\d{4}-\d\d-\d\d/.test(value)))
      for (const day of ['0000-01-01', '2026-02-30', '2026-13-01', '99999-01-01']) {
        const { errors } = expectProblem(await call(agent, name, { ...input, body: place.with(String(place.value).replace(/^\d{4}-\d\d-\d\d/, day)) }), 400);
        expect(names(errors, place.path)).toBe(true);
      }
  });

  it('refuses deep, broken and enormous JSON', async () => {
    const { agent, params, version } = await example(name);
    const raw = (body: string) => {
      const method = endpoints[name].method.toLowerCase() as 'post' | 'put';
      return agent[method](pathOf(name, params)).set('If-Match', `"${version ?? 1}"`).type('application/json').send(body);
    };
    const before = service.faults.length;
    expectProblem(await raw(`${'['.repeat(100_000)}${']'.repeat(100_000)}`), 400);
    expectProblem(await raw(`{"name":${'{"a":'.repeat(50_000)}1${'}'.repeat(50_000)}}`), 400);
    expectProblem(await raw('{"name": "Dov'), 400);
    expectProblem(await raw('"only text"'), 400);
    expectProblem(await raw('{"__proto__": {"role": "owner"}}'), 400);
    // A tablet's outbox may be larger than anything else.
    expectProblem(await raw(JSON.stringify({ name: 'x'.repeat((name === 'deliver' ? 22 : 2) * 1024 * 1024) })), 413);
    expect(service.faults.slice(before)).toEqual([]);
  });
});

describe.each(rows(({ needsVersion }) => needsVersion === true))('%s', (name) => {
  it('wants the version that was seen: none is 428, another than the present one is 412 with what is stored now', async () => {
    const { agent, version, ...input } = await example(name);
    const before = await snapshot();
    expectProblem(await call(agent, name, input), 428);
    for (const header of [String(version), '*', `W/"${version}"`, '"x"', '"-1"', '""', '"99999999999"']) {
      const method = endpoints[name].method.toLowerCase() as 'post' | 'put' | 'delete';
      const request = agent[method](pathOf(name, input.params)).set('If-Match', header);
      expectProblem(await (input.body === undefined ? request : request.send(input.body as object)), 428);
    }
    const { current } = expectProblem(await call(agent, name, { ...input, version: 999_999 }), 412);
    expect(current).toMatchObject({ version });
    expect(await snapshot()).toEqual(before);
  });
});

describe.each(rows(({ query }) => query !== undefined))('%s', (name) => {
  const fields = Object.keys((endpoints[name] as { query?: { shape?: object } }).query?.shape ?? {});
  const hasPages = fields.includes('after');

  it('refuses by name what its address does not know', async () => {
    const { agent, ...input } = await example(name);
    const wrong: [string, string][] = [['sort', 'name'], ['offset', '-1'], ['organisationId', other.organisation.id]];
    const limits: [string, string][] = fields.includes('limit') ? ['1000000000', '0', '-1', '1.5', 'all', '', 'NaN', '1e3'].map((limit) => ['limit', limit]) : [];
    for (const [key, value] of [...wrong, ...limits]) {
      const { errors } = expectProblem(await call(agent, name, { ...input, query: { ...input.query, [key]: value } }), 400);
      expect({ key, value, isNamed: names(errors, key) }).toEqual({ key, value, isNamed: true });
    }
  });

  it(hasPages ? 'refuses a place in the list that it did not give out' : 'has no pages', async () => {
    if (!hasPages) return;
    const { agent } = await example(name);
    const forged = (keys: unknown) => Buffer.from(JSON.stringify(keys)).toString('base64url');
    const before = service.faults.length;
    const id = newId();
    for (const after of ['x', '', '%00', forged([]), forged(['a', 'b', 'c', 'd']), forged([{ a: 1 }]), forged(['x', 'y']), forged([id, 'y']), forged(['\u0000', id]), forged(['not an id']), forged([1e30]), forged([1.5]), forged([1e30, 1]), forged('text')]) {
      const { errors } = expectProblem(await call(agent, name, { query: { after } }), 400);
      expect({ after, isNamed: names(errors, 'after') }).toEqual({ after, isNamed: true });
    }
    // A name where lists are sorted by name, nonsense where they are sorted by time: never a fault.
    expect([200, 400]).toContain((await call(agent, name, { query: { after: forged(['2026-13-45T00:00:00.000Z', id]) } })).status);
    expect(service.faults.slice(before)).toEqual([]);
  });

  it("finds nothing under another organisation's id", async () => {
    const { agent, ...input } = await example(name);
    const ids = Object.entries(input.query ?? {}).filter(([key]) => key.endsWith('Id'));
    for (const [key] of ids) {
      const response = await call(agent, name, { query: { [key]: other.ids[key] ?? '' } });
      expect(response.status).toBe(200);
      const body: unknown = hasPages ? (response.body as { items: unknown[] }).items : String(response.body).trim().split('\r\n').slice(1);
      expect(body).toEqual([]);
    }
  });

  it('takes hostile words to look for as words', async () => {
    const { agent } = await example(name);
    if (!fields.includes('q')) return;
    for (const q of ["'; DROP TABLE people; --", '%%', '__', '\\\\', '<script>', '(((', ':*&|!']) expect((await call(agent, name, { query: { q } })).status).toBe(200);
    for (const q of ['\u0000', 'x'.repeat(101)]) expect(names(expectProblem(await call(agent, name, { query: { q } }), 400).errors, 'q')).toBe(true);
  });
});

describe.each(rows(({ method }) => method !== 'GET'))('%s', (name) => {
  it('is refused when it does not come from our own page', async () => {
    const { agent, ...input } = await example(name);
    const { method: verb } = endpoints[name];
    const method = verb.toLowerCase() as 'post' | 'put' | 'delete';
    const before = await snapshot();
    const headers: Record<string, string>[] = [
      { Origin: 'https://elsewhere.example' },
      { Origin: 'null' },
      { Origin: 'http://kneeboard.test.elsewhere.example' },
      { 'Sec-Fetch-Site': 'cross-site' },
      { 'Sec-Fetch-Site': 'same-site' },
      { 'Sec-Fetch-Site': 'none' },
      { Origin: 'https://elsewhere.example', 'Sec-Fetch-Site': 'same-origin' },
      {},
    ];
    for (const each of headers) {
      const request = agent[method](pathOf(name, input.params)).unset('Origin').set(each).set('If-Match', `"${input.version ?? 1}"`);
      expectProblem(await (input.body === undefined ? request : request.send(input.body as object)), 403);
    }
    expect(await snapshot()).toEqual(before);
  });
});

it('answers an address that is not in the contract as not found, in JSON', async () => {
  for (const path of ['/api/', '/api/nothing', '/api/people/x/y', '/api/session/other']) expectProblem(await own.organisation.owner.agent.get(path), 404);
  expectProblem(await own.organisation.owner.agent.patch('/api/people').send({}), 404);
});

it('never tells the database, the framework or a stack in a problem, and lets no page frame it', async () => {
  const response = await own.organisation.owner.agent.get(`/api/people/${newId()}`);
  expect(JSON.stringify(response.body)).not.toMatch(/select|drizzle|node_modules|postgres/i);
  expect(response.headers).toMatchObject({ 'cache-control': 'no-store', 'x-content-type-options': 'nosniff', 'content-security-policy': expect.stringContaining("frame-ancestors 'none'") });
  expect(response.headers).not.toHaveProperty('x-powered-by');
});
