import { removeDataFolder, startSelvedge } from './running-selvedge';

/**
 * One Selvedge for all journeys, on a fresh folder: each journey makes what it changes. SELVEDGE_E2E_URL with
 * SELVEDGE_E2E_DATA_DIR points them at one that is already running, for work on a single journey.
 */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.SELVEDGE_E2E_URL) return undefined;
  const selvedge = await startSelvedge();
  process.env.SELVEDGE_E2E_URL = selvedge.address;
  process.env.SELVEDGE_E2E_DATA_DIR = selvedge.dataDir;
  return async () => {
    await selvedge.stop();
    await removeDataFolder(selvedge.dataDir);
  };
}
