import { startMailCatcher } from './mail-catcher';

/** The mail catcher as a process of its own; "start" gives it its port and folder. */
const stop = await startMailCatcher({
  port: Number(process.env.SELVEDGE_MAIL_PORT),
  folder: String(process.env.SELVEDGE_MAIL_DIR),
});
console.log('catching mail');
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop().then(() => process.exit(0)));
