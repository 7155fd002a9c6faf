import { ApiError, type ApiErrorCode } from './api-error.ts';

/** What happened, and what to do next. */
export type ErrorText = { what: string; next: string };

const texts: Record<ApiErrorCode, ErrorText> = {
  unreachable: {
    what: 'No connection to the server.',
    next: 'Nothing was changed. Check the network and try again.',
  },
  unreadable: {
    what: 'The answer could not be understood.',
    next: 'Something between you and the server may be in the way. Try again in a moment.',
  },
  'bad-request': { what: 'Something in it cannot be taken as it is.', next: 'Check what you entered.' },
  'not-signed-in': { what: 'You are signed out.', next: 'Sign in again; what you typed is kept.' },
  'wrong-credentials': { what: 'E-mail or password is not right.', next: 'Try again, or have a new password sent.' },
  forbidden: { what: 'Your role does not allow this.', next: 'Ask an owner of the shop, who can change roles.' },
  'cross-site': { what: 'The request seems to come from another site.', next: 'Reload the page and try again.' },
  'not-found': {
    what: 'It is not here.',
    next: 'It may have been removed, or belong to another shop. Go back and look again.',
  },
  stale: {
    what: 'Somebody else changed it in the meantime.',
    next: 'What you see now is how it stands. Look again, then repeat your change if it still fits.',
  },
  taken: { what: 'Somebody else was faster.', next: 'Look at how it stands now and try again.' },
  'ground-shifted': {
    what: 'The posted plan has changed since this draft was begun.',
    next: 'Compare the draft with it, or drop the draft and begin a new one.',
  },
  'key-reused': { what: 'This was sent before with other contents.', next: 'Reload the page and enter it again.' },
  gone: { what: 'This link was used already or is too old.', next: 'Ask for a new one.' },
  'too-large': { what: 'It is too large to send.', next: 'Make it smaller and try again.' },
  'wrong-kind': {
    what: 'This kind of file is not taken here.',
    next: 'What counts is what the file holds, not how it is called. Choose another one.',
  },
  refused: { what: 'This breaks a rule, so nothing was changed.', next: '' },
  'too-many': { what: 'Too many tries.', next: 'Wait a moment before the next one.' },
  internal: { what: 'Something went wrong on the server.', next: 'It was noted there. Try again in a moment.' },
  unavailable: { what: 'The server is busy or restarting.', next: 'Try again in a moment.' },
};

/** An error as a person can use it. An error that is no answer of ours is a fault of the page itself. */
export function errorText(error: unknown): ErrorText {
  if (!(error instanceof ApiError))
    return { what: 'This page has run into a fault of its own.', next: 'Reload it; what was saved is safe.' };
  const text = texts[error.code];
  if (error.code === 'too-many' && error.retryAfterSeconds !== null)
    return { what: text.what, next: `Wait ${waitText(error.retryAfterSeconds)} before the next one.` };
  return text;
}

const waitText = (seconds: number): string =>
  seconds < 90 ? `${Math.max(1, Math.ceil(seconds))} seconds` : `${Math.ceil(seconds / 60)} minutes`;
