import { type Action, type Actor, mayAttempt } from '@/lib/domain/access';
import type { SiteEntry } from './site-index';

interface Counts {
  readonly scanners: number;
  readonly protocols: number;
  readonly policyVersion: number;
  /** Mails that were given up. */
  readonly undelivered: number;
}

/** The set-up pages a person may open, from the one permission table. */
export function siteEntries(actor: Actor, counts: Counts): SiteEntry[] {
  const all: (SiteEntry & { needs: Action })[] = [
    {
      href: '/site/scanners',
      title: 'Scanners',
      text: 'Openings, tables, limits, the form each takes oversampling in',
      state: counts.scanners === 0 ? 'none yet' : String(counts.scanners),
      needs: 'scanner.read',
    },
    {
      href: '/site/protocols',
      title: 'Protocols',
      text: 'Sequences with their figures, and the keep-clear area',
      state: counts.protocols === 0 ? 'none yet' : String(counts.protocols),
      needs: 'protocol.read',
    },
    {
      href: '/site/policy',
      title: 'Policy',
      text: 'Safety margins, certainty, cost points',
      state: counts.policyVersion === 0 ? 'the standard' : `version ${counts.policyVersion}`,
      needs: 'policy.read',
    },
    {
      href: '/site/details',
      title: 'Name and numbers',
      text: 'The site’s name, the form of its accession numbers',
      needs: 'site.edit',
    },
    {
      href: '/site/people',
      title: 'People',
      text: 'Who has an account, and in which roles',
      needs: 'person.read',
    },
    {
      href: '/site/tokens',
      title: 'API tokens',
      text: 'For machines that ask on the site’s behalf',
      needs: 'api-token.read',
    },
    {
      href: '/site/audit',
      title: 'Audit log',
      text: 'Who changed which record, and when',
      needs: 'audit.read',
    },
    {
      href: '/site/mail',
      title: 'Mail',
      text: 'What went out, what waits, and what was not accepted',
      ...(counts.undelivered === 0 ? {} : { state: `${counts.undelivered} not delivered` }),
      needs: 'mail.read',
    },
  ];
  return all.filter((entry) => mayAttempt(actor, entry.needs)).map(({ needs: _needs, ...entry }) => entry);
}
