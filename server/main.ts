import { createServer, type Server } from 'node:http';
import { createApp } from './app.ts';
import { fail, openProgram } from './program.ts';
import { prepareDummyHash } from './services/passwords.ts';

/** Longer than what is under way should take, shorter than the patience of who stops us. */
const graceMilliseconds = 8_000;

const deps = openProgram();
const { HOST, PORT } = deps.config;
const program = createApp(deps);
await prepareDummyHash(deps);
program.start();

const server = createServer({ requestTimeout: 30_000, headersTimeout: 10_000, keepAliveTimeout: 10_000 }, program.app);
server.once('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EADDRINUSE')
    fail(`Port ${PORT} of ${HOST} is taken. Stop the program that uses it, or set PORT.`);
  fail(`The web server cannot listen on ${HOST}:${PORT}: ${error.message}`);
});
server.listen(PORT, HOST, () => deps.log.info({ address: server.address(), url: deps.config.PUBLIC_URL }, 'listening'));

let stopping = false;
async function stop(signal: string): Promise<void> {
  if (stopping) return;
  stopping = true;
  deps.log.info({ signal }, 'stopping');
  const closed = closeServer(server);
  await program.drain();
  await closed;
  await program.close();
  await deps.db.destroy();
  process.exit(0);
}

/** Takes nothing new, answers what is under way, and cuts off what is still not done after the time of grace. */
function closeServer(closing: Server): Promise<void> {
  const idle = setInterval(() => closing.closeIdleConnections(), 100);
  const late = setTimeout(() => closing.closeAllConnections(), graceMilliseconds);
  return new Promise((resolve) => {
    closing.close(() => {
      clearInterval(idle);
      clearTimeout(late);
      resolve();
    });
  });
}

for (const signal of ['SIGTERM', 'SIGINT']) process.on(signal, () => void stop(signal));
