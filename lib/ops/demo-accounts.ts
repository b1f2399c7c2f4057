import { randomInt } from 'node:crypto';
import path from 'node:path';
import { readJson, writePrivateJson } from './local-files';

export interface DemoAccount {
  readonly email: string;
  readonly displayName: string;
  readonly roles: readonly string[];
  readonly password: string;
}

const PEOPLE = [
  { email: 'radiographer@selvedge.example', displayName: 'Robin Thread', roles: ['radiographer'] },
  { email: 'coordinator@selvedge.example', displayName: 'Casey Weft', roles: ['coordinator'] },
  { email: 'lead@selvedge.example', displayName: 'Lee Warp', roles: ['lead'] },
  { email: 'radiologist@selvedge.example', displayName: 'Dana Twill', roles: ['radiologist'] },
  { email: 'educator@selvedge.example', displayName: 'Eli Loom', roles: ['educator'] },
];

// Letters and digits that cannot be mistaken for one another when typed from a terminal.
const ALPHABET = 'abcdefghjkmnpqrstuvwxyz23456789';

function randomPassword(): string {
  const word = () => Array.from({ length: 5 }, () => ALPHABET[randomInt(ALPHABET.length)]).join('');
  return [word(), word(), word()].join('-');
}

/** The demo site's people, with passwords drawn once for this installation and readable by its owner only. */
export async function demoAccounts(folder: string): Promise<DemoAccount[]> {
  const file = path.join(folder, 'demo-accounts.json');
  const known = (await readJson<DemoAccount[]>(file)) ?? [];
  const accounts = PEOPLE.map((person) => ({
    ...person,
    password: known.find((account) => account.email === person.email)?.password ?? randomPassword(),
  }));
  if (known.length !== accounts.length) await writePrivateJson(file, accounts);
  return accounts;
}
