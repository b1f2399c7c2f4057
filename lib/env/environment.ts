import * as z from 'zod';

const url = (protocols: string[]) =>
  z.string().refine((text) => URL.canParse(text) && protocols.includes(new URL(text).protocol), {
    error: (issue) => `must be a URL starting with ${protocols.map((p) => `${p}//`).join(' or ')}, given ${JSON.stringify(redact(issue.input))}`,
  });

/** A URL may hold a password; an error message must not. */
function redact(value: unknown): unknown {
  return typeof value === 'string' ? value.replace(/\/\/[^@/]*@/, '//…@') : value;
}

const schema = z.object({
  DATABASE_URL: url(['postgres:', 'postgresql:']),
  NEXTAUTH_URL: url(['http:', 'https:']),
  NEXTAUTH_SECRET: z.string().min(32, 'must be at least 32 characters'),
  SMTP_URL: url(['smtp:', 'smtps:']),
  MAIL_FROM: z.string().min(3).default('Selvedge <selvedge@localhost>'),
  /** Where the local mail catcher keeps what it caught; set by "npm start" with the local cluster only. */
  SELVEDGE_MAIL_DIR: z.string().min(1).optional(),
  /** How many reverse proxies of our own stand in front and append to X-Forwarded-For. */
  SELVEDGE_TRUSTED_PROXIES: z.coerce.number('must be a whole number').int().min(0).max(10).default(0),
});

export interface Environment {
  readonly databaseUrl: string;
  /** Origin of the service as people reach it, without a trailing slash. Links are built from this only. */
  readonly publicUrl: string;
  readonly sessionSecret: string;
  readonly smtpUrl: string;
  readonly mailFrom: string;
  readonly caughtMailFolder: string | null;
  readonly trustedProxies: number;
}

export class EnvironmentError extends Error {
  override readonly name = 'EnvironmentError';
}

export function parseEnvironment(variables: Record<string, string | undefined>): Environment {
  // An empty variable in a shell script means "not set".
  const given = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== ''));
  const parsed = schema.safeParse(given);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => {
      const name = issue.path.join('.');
      return `  ${name} ${given[name] === undefined ? 'is not set' : issue.message}`;
    });
    throw new EnvironmentError(`The configuration is not complete:\n${lines.join('\n')}`);
  }
  const value = parsed.data;
  return {
    databaseUrl: value.DATABASE_URL,
    publicUrl: new URL(value.NEXTAUTH_URL).origin,
    sessionSecret: value.NEXTAUTH_SECRET,
    smtpUrl: value.SMTP_URL,
    mailFrom: value.MAIL_FROM,
    caughtMailFolder: value.SELVEDGE_MAIL_DIR ?? null,
    trustedProxies: value.SELVEDGE_TRUSTED_PROXIES,
  };
}

let cached: Environment | undefined;

/** The process's configuration, read and checked once. */
export function environment(): Environment {
  cached ??= parseEnvironment(process.env);
  return cached;
}
