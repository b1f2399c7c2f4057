import { signIn } from 'next-auth/react';

const WORDS: Readonly<Record<string, string>> = {
  CredentialsSignin: 'E-mail address and password do not belong together. Check both, or ask for a new password below.',
  'too-many': 'Too many attempts for this account. Wait a minute, then try again.',
};
const NO_ANSWER = 'The server did not answer. What you typed is still here; try again shortly.';

/** Signs in by the session route. @returns null when signed in, else what to say */
export async function signInWith(email: string, password: string): Promise<string | null> {
  try {
    const result = await signIn('credentials', { email, password, redirect: false, callbackUrl: '/' });
    if (result?.ok && !result.error) return null;
    return WORDS[result?.error ?? ''] ?? NO_ANSWER;
  } catch {
    return NO_ANSWER;
  }
}
