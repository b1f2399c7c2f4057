import { removeDataFolder, startSelvedge } from '@/tests/support/e2e/running-selvedge';

/** A Selvedge of its own, unless one is named as for the journeys. */
export async function measuredSelvedge() {
  const { SELVEDGE_E2E_URL: address, SELVEDGE_E2E_DATA_DIR: dataDir } = process.env;
  if (address && dataDir) return { address, dataDir, end: async () => {} };
  const own = await startSelvedge();
  return { ...own, end: async () => void (await own.stop(), await removeDataFolder(own.dataDir)) };
}
