import nodemailer from 'nodemailer';
import * as z from 'zod';
import type { Config } from '../config.ts';

export type Letter = { subject: string; text: string; html: string };

/** What the other side will not take however often it is sent: there is no such mailbox. */
export class Undeliverable extends Error {}

export type Mailer = {
  /**
   * Hands one letter to the mail server. The same `id` gives the same Message-ID, so that a letter which was sent twice
   * is known as one.
   * @throws {Undeliverable} where the address is refused for good; any other error is worth another try
   */
  send(to: string, id: string, letter: Letter): Promise<void>;
};

const noSuchMailbox = z.object({ responseCode: z.number().int().min(550).max(559), command: z.literal('RCPT TO') });

/** A connection for each letter: a pool would hold letters back in memory, where a crash loses them. */
export function makeMailer(config: Config, smtpUrl: string): Mailer {
  const transport = nodemailer.createTransport({
    url: smtpUrl,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 30_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  const host = new URL(config.PUBLIC_URL).hostname;
  return {
    async send(to, id, letter) {
      try {
        await transport.sendMail({
          from: config.MAIL_FROM,
          // As an object: a name in an address could otherwise smuggle in a second one.
          to: { name: '', address: to },
          messageId: `<${id}@${host}>`,
          subject: oneLine(letter.subject),
          text: letter.text,
          html: letter.html,
          headers: { 'Auto-Submitted': 'auto-generated' },
        });
      } catch (error) {
        if (noSuchMailbox.safeParse(error).success)
          throw new Undeliverable(error instanceof Error ? error.message : String(error), { cause: error });
        throw error;
      }
    },
  };
}

/** A line break in a subject would start a header of its own. */
const oneLine = (text: string): string => text.replace(/\p{Cc}+/gu, ' ').trim();
