import { describe, expect, it } from 'vitest';
import { PASSWORD_MAX, PASSWORD_MIN, passwordFault } from '@/lib/domain/people';

const ABOUT = ['lee.warp@selvedge.example', 'Lee Warp'];

describe('passwordFault', () => {
  it.each(['seven looms by the harbour', 'x7#kQ9!vLm2$', 'Zettelkasten 1927 grün', 'k'.repeat(3) + 'lamp of brass'])('accepts %j', (password) => {
    expect(passwordFault(password, ABOUT)).toBeNull();
  });

  it('names what was given and what is allowed at both ends', () => {
    expect(passwordFault('x7#kQ9!vLm2')).toMatch(/^11 characters given; at least 12/);
    expect(passwordFault('seven looms '.repeat(17))).toMatch(/^204 characters given; at most 200/);
    expect(passwordFault('x7#kQ9!vLm2$')).toBeNull();
    expect([PASSWORD_MIN, PASSWORD_MAX]).toEqual([12, 200]);
  });

  it.each(['aaaaaaaaaaaaaaaa', 'abababababababab', 'abcdefghijklmnop', '9876543210987654', 'zyxwvutsrqponm'])('refuses the pattern %j', (password) => {
    expect(passwordFault(password)).not.toBeNull();
  });

  it.each(['password123456', 'Password-2026!!', 'leewarp-leewarp', 'Selvedge 2026 !', 'lee.warp@selvedge.example', 'QWERTY qwerty 123456'])(
    'refuses %j, which is what would be tried first',
    (password) => expect(passwordFault(password, ABOUT)).not.toBeNull(),
  );
});
