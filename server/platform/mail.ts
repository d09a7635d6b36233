import { createTransport } from 'nodemailer';

export interface Mail {
  send(message: { to: readonly string[]; subject: string; text: string }): Promise<void>;
}

export function createMail(url: string | undefined, from: string): Mail {
  // Shorter than the queue's patience: a mail server that accepts and says nothing is tried again.
  const transport = url ? createTransport({ url, connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 30_000 }) : undefined;
  return {
    async send({ to, subject, text }) {
      if (!transport || to.length === 0) return;
      await transport.sendMail({ from, to: [...to], subject, text });
    },
  };
}
