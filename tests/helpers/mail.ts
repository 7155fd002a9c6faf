import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer, type SMTPServerOptions } from 'smtp-server';

export type MailServer = {
  url: string;
  /** Every letter that was taken, in order. */
  letters: ParsedMail[];
  /** Resolves once so many letters were taken. */
  took(count: number): Promise<void>;
  /** As if the line went dead: every open connection is cut. */
  hangUp(): void;
  close(): Promise<void>;
};

/** A real SMTP server on the loopback; `options` make it refuse, stall or hang up. */
export async function mailServer(options: SMTPServerOptions = {}): Promise<MailServer> {
  const letters: ParsedMail[] = [];
  const waiting: { count: number; done: () => void }[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    closeTimeout: 200,
    onData: (stream, _session, done) => {
      simpleParser(stream).then((letter) => {
        letters.push(letter);
        done();
        for (const waiter of waiting) if (letters.length >= waiter.count) waiter.done();
      }, done);
    },
    ...options,
  });
  server.on('error', () => undefined); // clients that hang up are part of what is tested
  const listening = server.listen(0, '127.0.0.1');
  await once(listening, 'listening');
  return {
    url: `smtp://127.0.0.1:${(listening.address() as AddressInfo).port}`,
    letters,
    took: (count) =>
      new Promise((done) => {
        if (letters.length >= count) done();
        else waiting.push({ count, done });
      }),
    hangUp: () => {
      for (const { _socket } of server.connections as unknown as Iterable<{ _socket: { destroy(): void } }>)
        _socket.destroy();
    },
    close: () => new Promise((done) => server.close(done)),
  };
}

/** The token of the link in a letter: what stands behind # in its text. */
export function tokenIn(letter: ParsedMail | undefined): string {
  const token = /https?:\S+#([A-Za-z0-9_-]+)/.exec(letter?.text ?? '')?.[1];
  if (token === undefined) throw new Error(`no link in the letter: ${letter?.text}`);
  return token;
}
