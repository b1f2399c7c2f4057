import { LocalError, portIsFree, portNear } from '@/db/local';
import { parseEnvironment } from '@/lib/env';
import { type DemoAccount } from './demo-accounts';
import { caughtMailFolder, startLocalDatabase } from './local-database';
import { dataFolder, rememberPorts, rememberedPorts } from './local-files';
import { prepareDatabase } from './prepare-database';
import { takeRunLock } from './run-lock';
import { seedDemoSite } from './seed-demo-site';
import { type Env, type Service, startService, stopService, stopSignal } from './supervise';
import { waitUntilServing } from './wait-until-serving';
import { ensureBuild, NEXT_PROGRAM } from './web-build';

type Mode = 'production' | 'development';
/** Undone in reverse order when we stop, however far we came. */
type Undo = () => Promise<void>;

const REAL_SERVICES = ['DATABASE_URL', 'SMTP_URL', 'NEXTAUTH_URL'] as const;
const DEFAULT_WEB_PORT = 3000;

export const start = () => run('production');
export const startForDevelopment = () => run('development');

async function run(mode: Mode): Promise<void> {
  const abort = new AbortController();
  const stopped = stopSignal().then((signal) => {
    abort.abort();
    return signal;
  });
  const undo: Undo[] = [];
  try {
    const given = REAL_SERVICES.filter((name) => process.env[name]);
    if (given.length > 0 && given.length < REAL_SERVICES.length) {
      const missing = REAL_SERVICES.filter((name) => !process.env[name]);
      throw new LocalError(
        `${given.join(' and ')} given without ${missing.join(' and ')}. Give all three to use services of your own, or none to run everything here.`,
      );
    }
    const serving = begin(mode, given.length > 0, undo, abort.signal);
    const outcome = await Promise.race([stopped, serving.then((services) => firstGone(services))]);
    if (outcome.startsWith('SIG')) console.log('\nStopping …');
    else throw new LocalError(`Stopping, because a part of Selvedge ended by itself: ${outcome}`);
    // A start that was interrupted half-way must have ended before we undo it.
    await serving.catch(() => {});
  } finally {
    // Whatever still waits for a part that will not come must not hold the process.
    abort.abort();
    for (const step of undo.reverse()) await step().catch((error: Error) => console.error(error.message));
  }
  process.exit(process.exitCode ?? 0);
}

async function firstGone(services: readonly Service[]): Promise<string> {
  return Promise.race(services.map(async ({ name, gone }) => `${name}: ${await gone}`));
}

async function begin(mode: Mode, realServices: boolean, undo: Undo[], signal: AbortSignal): Promise<Service[]> {
  const { env, accounts } = realServices ? await onRealServices() : await onLocalServices(undo);
  const services: Service[] = [];
  const launch = (name: string, args: string[], extra: Env = {}) => {
    signal.throwIfAborted();
    const service = startService(name, args, { ...env, ...extra });
    services.push(service);
    undo.push(() => stopService(service));
  };

  if (mode === 'production') {
    signal.throwIfAborted();
    await ensureBuild(env, signal);
  }
  if (!realServices) launch('mail', ['--import', 'tsx', 'lib/ops/catch-mail.ts']);
  launch('worker', ['--import', 'tsx', 'lib/ops/worker.ts']);
  const { port, hostname } = { port: env.PORT ?? String(DEFAULT_WEB_PORT), hostname: realServices ? '0.0.0.0' : '127.0.0.1' };
  launch('web', [NEXT_PROGRAM, mode === 'production' ? 'start' : 'dev', '-p', port, '-H', hostname], {
    NODE_ENV: mode,
    NEXT_TELEMETRY_DISABLED: '1',
  });

  const web = services.at(-1)!;
  await Promise.race([
    waitUntilServing(`http://127.0.0.1:${port}`, signal),
    web.gone.then((how) => {
      throw new LocalError(`The web server did not start: ${how}`);
    }),
  ]);
  announce(env.NEXTAUTH_URL!, accounts);
  return services;
}

async function onRealServices(): Promise<{ env: Env; accounts: DemoAccount[] }> {
  parseEnvironment(process.env);
  const owner = process.env.MIGRATION_DATABASE_URL;
  if (owner) await prepareDatabase(owner);
  return { env: { ...process.env }, accounts: [] };
}

async function onLocalServices(undo: Undo[]): Promise<{ env: Env; accounts: DemoAccount[] }> {
  const folder = dataFolder();
  undo.push(await takeRunLock(folder));
  console.log('Starting the database …');
  const { cluster, secrets, ownerUrl, appUrl } = await startLocalDatabase(folder);
  undo.push(() => cluster.stop());
  const accounts = await seedDemoSite(ownerUrl, folder);

  const ports = await rememberedPorts(folder);
  const web = await webPort(ports.web);
  const mail = await portNear(ports.mail);
  await rememberPorts(folder, { ...ports, web, mail });
  return {
    accounts,
    env: {
      ...process.env,
      PORT: String(web),
      DATABASE_URL: appUrl,
      NEXTAUTH_URL: `http://127.0.0.1:${web}`,
      NEXTAUTH_SECRET: secrets.sessionSecret,
      NEXT_SERVER_ACTIONS_ENCRYPTION_KEY: secrets.serverActionsKey,
      SMTP_URL: `smtp://127.0.0.1:${mail}`,
      SELVEDGE_MAIL_PORT: String(mail),
      SELVEDGE_MAIL_DIR: caughtMailFolder(folder),
    },
  };
}

/** PORT when given (an error when it is taken), else the port of last time, else 3000, else any free one. */
async function webPort(remembered: number | undefined): Promise<number> {
  const asked = process.env.PORT;
  if (asked) {
    const port = Number(asked);
    if (!Number.isInteger(port) || port < 1 || port > 65535) throw new LocalError(`PORT is "${asked}"; allowed is a number from 1 to 65535.`);
    if (!(await portIsFree(port))) throw new LocalError(`Port ${port} is taken by another program. Stop that, or set PORT to another.`);
    return port;
  }
  const wanted = remembered ?? DEFAULT_WEB_PORT;
  const port = await portNear(wanted);
  if (port !== wanted) console.log(`Port ${wanted} is taken by another program; using ${port}.`);
  return port;
}

function announce(address: string, accounts: readonly DemoAccount[]): void {
  const lines = [`Selvedge is at ${address}`];
  if (accounts.length > 0) {
    const width = Math.max(...accounts.map(({ email }) => email.length));
    lines.push('', 'Demo accounts of this installation:');
    for (const { email, password, roles } of accounts) lines.push(`  ${email.padEnd(width)}  ${password}  (${roles.join(', ')})`);
  }
  lines.push('', 'Ctrl-C stops everything.');
  console.log(`\n${lines.join('\n')}\n`);
}
