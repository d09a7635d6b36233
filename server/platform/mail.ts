import { createTransport } from 'nodemailer';

export interface Mail {
  send(message: { to: readonly string[]; subject: string; text: string }): Promise<void>;
}

export function createMail(url: string | undefined, from: string): Mail {
  const transport = url ? createTransport(url) : undefined;
  return {
    async send({ to, subject, text }) {
      if (!transport || to.length === 0) return;
      await transport.sendMail({ from, to: [...to], subject, text });
    },
  };
}
