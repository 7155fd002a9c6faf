import { startLocalMail } from './mail/local-mail.ts';
import { fail } from './program.ts';

const folder = process.env['DEV_MAILBOX_DIR'];
const port = Number(process.env['LOCAL_MAIL_PORT'] || '0');
if (!folder) fail('DEV_MAILBOX_DIR must name the folder in which the local mail server keeps letters.');
if (!Number.isInteger(port) || port < 0 || port > 65_535) fail('LOCAL_MAIL_PORT must be a port number.');

const mail = await startLocalMail({ folder, port }).catch((error: unknown) =>
  fail(`The local mail server cannot start: ${error instanceof Error ? error.message : String(error)}`),
);
process.stdout.write(`${JSON.stringify({ ready: true, port: mail.port })}\n`);
for (const signal of ['SIGTERM', 'SIGINT']) process.once(signal, () => void mail.close().then(() => process.exit(0)));
