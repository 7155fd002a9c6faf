import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { readConfig } from '#server/config.ts';
import { invitationLetter } from '#server/mail/letters/invitation.tsx';
import { planChangedLetter } from '#server/mail/letters/plan-changed.tsx';
import { resetLetter } from '#server/mail/letters/reset.tsx';
import { trainingEndsLetter } from '#server/mail/letters/training-ends.tsx';
import { makeMailer, Undeliverable, type Letter } from '#server/mail/mailer.ts';
import { mailServer, type MailServer } from '../helpers/mail.ts';

const config = readConfig({
  NODE_ENV: 'test',
  DATABASE_URL: 'postgres://127.0.0.1/none',
  SESSION_SECRET: 'x'.repeat(32),
  PUBLIC_URL: 'https://shop.test:8443',
  MAIL_FROM: 'Ovenbird <paint@shop.test>',
});

const planChanged = {
  name: 'Pat',
  shopName: 'North',
  timeZone: 'America/New_York',
  clock: '24' as const,
  link: 'https://shop.test/bench',
  planNumber: 7,
  changes: [
    {
      kind: 'planned' as const,
      jobNumber: 12,
      jobTitle: 'Left wing <b>&</b>',
      stageTitle: 'Clear',
      from: null,
      to: { placeName: 'Booth 1', startsAt: '2026-03-10T12:00:00Z', endsAt: '2026-03-10T13:30:00Z' },
    },
    {
      kind: 'moved' as const,
      jobNumber: 13,
      jobTitle: 'Bonnet',
      stageTitle: 'Prep',
      // The night in which clocks in New York go from 02:00 to 03:00.
      from: { placeName: 'Prep 1', startsAt: '2026-03-08T04:30:00Z', endsAt: '2026-03-08T07:30:00Z' },
      to: { placeName: 'Prep 2', startsAt: '2026-03-08T06:30:00Z', endsAt: '2026-03-08T07:30:00Z' },
    },
    {
      kind: 'taken-off' as const,
      jobNumber: 14,
      jobTitle: 'Door',
      stageTitle: 'Base',
      from: { placeName: 'Booth 2', startsAt: '2026-03-11T20:00:00Z', endsAt: '2026-03-11T21:00:00Z' },
      to: null,
    },
  ],
};

describe('a letter of changes', () => {
  test('tells them in the shop’s zone, on the night the clocks change too', async () => {
    const { subject, text } = await planChangedLetter(planChanged);
    expect(subject).toBe('3 changes in your work: plan 7');
    expect(text).toContain('Planned: Clear');
    expect(text).toContain('Tue 10 Mar, 08:00 to 09:30, Booth 1');
    expect(text).toContain('Sun 8 Mar, 01:30 to 03:30, Prep 2');
    expect(text).toContain('Before: Sat 7 Mar, 23:30 to Sun 8 Mar, 03:30, Prep 1');
    expect(text).toContain('Taken off: Base');
    expect(text).toContain('Before: Wed 11 Mar, 16:00 to 17:00, Booth 2');
    expect(text).toContain('https://shop.test/bench');
  });

  test('by the reader’s clock', async () => {
    const { text, subject } = await planChangedLetter({
      ...planChanged,
      clock: '12',
      changes: planChanged.changes.slice(0, 1),
    });
    expect(subject).toBe('One change in your work: plan 7');
    expect(text).toMatch(/Tue 10 Mar, 8:00\sAM to 9:30\sAM, Booth 1/);
  });

  test('shows what people typed as text', async () => {
    const { html } = await planChangedLetter(planChanged);
    expect(html).toContain('Left wing &lt;b&gt;&amp;&lt;/b&gt;');
    expect(html).not.toContain('<b>');
  });
});

describe('every letter', () => {
  const letters: [string, () => Promise<Letter>][] = [
    ['plan-changed', () => planChangedLetter(planChanged)],
    [
      'training-ends',
      () =>
        trainingEndsLetter({
          name: 'Olive',
          shopName: 'North',
          personName: 'Pat',
          goodThrough: '2026-06-08',
          link: 'https://shop.test/shop/people',
        }),
    ],
    ['reset', () => resetLetter({ name: 'Pat', link: 'https://shop.test/password-reset#abc', goodForMinutes: 30 })],
    [
      'invitation',
      () =>
        invitationLetter({ shopName: 'North', role: 'lead', link: 'https://shop.test/invitation#abc', goodForDays: 7 }),
    ],
  ];
  test.each(letters)('%s is whole without pictures, scripts and anything from elsewhere', async (_kind, write) => {
    const { html, text } = await write();
    expect(html).not.toMatch(/<(img|script|link|iframe|form)\b/i);
    const elsewhere = [...html.matchAll(/https?:\/\/([^/"'\s]+)/g)].map((match) => match[1]);
    // The document type names the standard it is written in.
    expect(new Set(elsewhere)).toEqual(new Set(['www.w3.org', 'shop.test']));
    expect(html).toContain('lang="en"');
    expect(html).toContain('name="color-scheme" content="light"');
    expect(text.length).toBeGreaterThan(100);
    expect(await write()).toEqual({ html, text, subject: expect.any(String) });
  });
});

describe('sent over SMTP', () => {
  let mail: MailServer;
  let letter: Letter;
  beforeAll(async () => {
    mail = await mailServer();
    letter = await planChangedLetter(planChanged);
  });
  afterAll(() => mail.close());

  test('it arrives as it was written, under the number of its row', async () => {
    await makeMailer(config, mail.url).send('pat@shop.test', '0190a0a0-0000-7000-8000-00000000000a', letter);
    const [got] = mail.letters;
    expect(got?.messageId).toBe('<0190a0a0-0000-7000-8000-00000000000a@shop.test>');
    expect(got?.from?.text).toBe('"Ovenbird" <paint@shop.test>');
    expect(got?.to).toMatchObject({ text: 'pat@shop.test' });
    expect(got?.subject).toBe(letter.subject);
    expect(got?.text?.trim()).toBe(letter.text.trim());
    expect(got?.html).toContain('Left wing &lt;b&gt;');
    expect(got?.headers.get('auto-submitted')).toBe('auto-generated');
  });

  test('a line break in a subject starts no header', async () => {
    const before = mail.letters.length;
    const subject = 'Hello\r\nBcc: all@shop.test\r\n\r\nbody';
    await makeMailer(config, mail.url).send('pat@shop.test', 'b', { ...letter, subject });
    const got = mail.letters[before];
    expect(got?.subject).toBe('Hello Bcc: all@shop.test body');
    expect(got?.headers.has('bcc')).toBe(false);
  });

  test('an address cannot hold a second one', async () => {
    const before = mail.letters.length;
    const sending = makeMailer(config, mail.url).send('a@shop.test, b@shop.test', 'c', letter);
    await sending.catch(() => undefined);
    const reached = mail.letters.slice(before).flatMap((got) => [got.to ?? []].flat().flatMap((to) => to.value));
    expect(reached.length).toBeLessThanOrEqual(1);
  });

  test('no such mailbox is told apart from not now', async () => {
    const refusing = await mailServer({
      onRcptTo: ({ address }, _session, done) =>
        done(Object.assign(new Error('no'), { responseCode: address.startsWith('nobody') ? 550 : 451 })),
    });
    const mailer = makeMailer(config, refusing.url);
    await expect(mailer.send('nobody@shop.test', 'd', letter)).rejects.toBeInstanceOf(Undeliverable);
    const later = await mailer.send('later@shop.test', 'e', letter).catch((error: unknown) => error);
    expect(later).toBeInstanceOf(Error);
    expect(later).not.toBeInstanceOf(Undeliverable);
    await refusing.close();
  });
});
