/** A TEST_… address that `npm test` and `server/local/dev-services.mjs` hand over. */
export function testEnvironment(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: run npm test, or take the lines that node server/local/dev-services.mjs prints.`);
  return value;
}
