import { connect, createServer, type Socket } from 'node:net';
import { portOf } from './service';

/** A door in front of something that listens, so that a test can take it away: closed, it drops what runs through it and takes nobody. */
export interface Gate {
  readonly port: number;
  /** Connections that were tried while it was closed. */
  turnedAway(): number;
  open(): void;
  close(): void;
  stop(): Promise<void>;
}

export async function gateTo(port: number): Promise<Gate> {
  const through = new Set<Socket>();
  let isOpen = true;
  let turnedAway = 0;
  const server = createServer((incoming) => {
    if (!isOpen) {
      turnedAway += 1;
      return void incoming.resetAndDestroy();
    }
    const outgoing = connect(port, '127.0.0.1');
    for (const [one, other] of [[incoming, outgoing], [outgoing, incoming]] as const) {
      through.add(one);
      one.pipe(other);
      one.on('error', () => other.destroy());
      one.on('close', () => {
        through.delete(one);
        other.destroy();
      });
    }
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    port: portOf(server as unknown as Parameters<typeof portOf>[0]),
    turnedAway: () => turnedAway,
    open: () => void (isOpen = true),
    close() {
      isOpen = false;
      for (const socket of through) socket.resetAndDestroy();
    },
    async stop() {
      for (const socket of through) socket.destroy();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}

/** The same address by way of the gate. */
export const through = (gate: Gate, url: string): string => Object.assign(new URL(url), { port: String(gate.port) }).toString();
