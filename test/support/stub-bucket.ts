import { createServer, request as forward, type IncomingMessage, type ServerResponse } from 'node:http';
import { portOf } from './service';
import { testEnvironment } from './environment';

export type BucketMood = 'good' | 'refuses' | 'answers 500' | 'hangs up' | 'cuts the answer';

/** The real bucket behind a door that a test can spoil. */
export async function stubBucket(): Promise<{ url: string; mood: BucketMood; stop(): Promise<void> }> {
  const target = new URL(testEnvironment('TEST_S3_ENDPOINT'));
  const stub = { url: '', mood: 'good' as BucketMood, stop: async (): Promise<void> => undefined };
  const server = createServer((incoming, outgoing) => {
    // A connection kept from before does not get through either.
    if (stub.mood === 'refuses') return void incoming.socket.resetAndDestroy();
    if (stub.mood === 'answers 500') {
      incoming.resume().on('end', () => outgoing.writeHead(500, { 'Content-Type': 'application/xml' }).end('<Error><Code>InternalError</Code></Error>'));
      return;
    }
    if (stub.mood === 'hangs up') {
      // In the middle of what is sent.
      incoming.once('data', () => incoming.socket.destroy());
      incoming.once('end', () => incoming.socket.destroy());
      return;
    }
    pass(incoming, outgoing);
  });
  // A closed door: connections are refused before a word is said.
  server.on('connection', (socket) => stub.mood === 'refuses' && socket.resetAndDestroy());
  const pass = (incoming: IncomingMessage, outgoing: ServerResponse): void => {
    const onward = forward({ host: target.hostname, port: target.port, method: incoming.method, path: incoming.url, headers: { ...incoming.headers, host: target.host } }, (answer) => {
      outgoing.writeHead(answer.statusCode ?? 502, answer.headers);
      if (stub.mood === 'cuts the answer') {
        answer.once('data', (piece: Buffer) => outgoing.write(piece.subarray(0, 10), () => outgoing.socket?.destroy()));
        return;
      }
      answer.pipe(outgoing);
    });
    onward.on('error', () => outgoing.destroy());
    incoming.pipe(onward);
  };
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  stub.url = `http://127.0.0.1:${portOf(server)}`;
  stub.stop = async () => {
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
  };
  return stub;
}
