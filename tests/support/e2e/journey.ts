import { type APIRequestContext, type BrowserContext, expect, type Page, test as base } from '@playwright/test';
import { type DemoAccount, demoAccountsOf } from './running-selvedge';

export type DemoRole = 'radiographer' | 'coordinator' | 'lead' | 'radiologist' | 'educator';

interface Journey {
  /** A page of the running demo site, signed in as the demo account of this role (never through the form). */
  readonly signedIn: (role: DemoRole) => Promise<Page>;
  /** Console errors a test provokes on purpose; any other fails it. */
  readonly expectedErrors: RegExp[];
}

const address = () => String(process.env.SELVEDGE_E2E_URL);

export async function accountOf(role: DemoRole): Promise<DemoAccount> {
  const accounts = await demoAccountsOf(String(process.env.SELVEDGE_E2E_DATA_DIR));
  const account = accounts.find(({ roles }) => roles.length === 1 && roles[0] === role);
  if (!account) throw new Error(`No demo account with the role "${role}"`);
  return account;
}

/** The same two requests the sign-in form makes. */
export async function signIn(request: APIRequestContext, account: DemoAccount, at = address()): Promise<void> {
  const { csrfToken } = (await (await request.get(`${at}/api/auth/csrf`)).json()) as { csrfToken: string };
  const answer = await request.post(`${at}/api/auth/callback/credentials`, {
    form: { csrfToken, email: account.email, password: account.password, callbackUrl: at, json: 'true' },
  });
  expect(answer.ok(), `signing in as ${account.email}`).toBe(true);
}

/** Notes what a page logs as an error, throws, or has refused by its own content policy. */
function watch(context: BrowserContext, errors: string[]): void {
  context.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  context.on('weberror', (error) => errors.push(String(error.error())));
}

export const test = base.extend<Journey>({
  baseURL: async ({}, provide) => provide(address()),

  expectedErrors: async ({}, provide) => provide([]),

  // Every page of the test's own context is watched, whether signed in or not.
  context: async ({ context, expectedErrors }, provide) => {
    const errors: string[] = [];
    watch(context, errors);
    await provide(context);
    const unexpected = errors.filter((error) => !expectedErrors.some((pattern) => pattern.test(error)));
    expect(unexpected, 'errors in the browser’s console').toEqual([]);
  },

  signedIn: async ({ context }, provide) => {
    await provide(async (role) => {
      await signIn(context.request, await accountOf(role));
      return context.newPage();
    });
  },
});

export { expect } from '@playwright/test';
