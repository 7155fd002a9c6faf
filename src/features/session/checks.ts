import { email, newPassword } from '#contracts/session.ts';

/** Checks of what is typed, as react-hook-form wants them: true, or what would be right. */
export const isEmail = (text: string): true | string =>
  email.safeParse(text.trim()).success || 'Enter an e-mail address such as name@shop.example.';

/** Length is what counts, so nothing else is asked of it. */
export function isNewPassword(text: string): true | string {
  if (newPassword.safeParse(text).success) return true;
  return text.length > 200 ? 'At most 200 characters.' : 'At least 10 characters; a few words in a row will do.';
}
export const newPasswordHint = 'At least 10 characters. Spaces and pasting are fine.';
