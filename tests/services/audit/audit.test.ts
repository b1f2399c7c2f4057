import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { AuditEntry } from '@/lib/domain/audit/audit-event';
import { listAudit } from '@/lib/services/audit/list-audit';
import { recordAudit } from '@/lib/services/audit/record-audit';
import { editPerson } from '@/lib/services/people/edit-person';
import { createTestSite } from '@/tests/support/database';
import { activePerson, outcomeOf } from '@/tests/support/database/accounts';

async function siteWithLog(length: number) {
  const site = await createTestSite();
  const lead = await activePerson(site, 'lead');
  const entries: AuditEntry[] = Array.from({ length }, (_, n) => ({
    action: n % 2 ? 'scanner.edit' : 'policy.edit',
    subjectType: n % 2 ? 'scanner' : 'site-policy',
    subjectId: randomUUID(),
    fields: ['name'],
  }));
  // All in one statement and so at one moment: paging must not rest on the time alone.
  await site.withApp((trx) => recordAudit(trx, { actor: lead }, ...entries));
  return { site, lead, entries };
}

describe('listAudit', () => {
  it('pages through everything once, though all lines carry the same moment', async () => {
    const { lead, entries } = await siteWithLog(120);
    const seen: string[] = [];
    let before: string | undefined;
    let pages = 0;
    do {
      const page = await listAudit({ actor: lead }, { before });
      seen.push(...page.events.map((event) => event.subjectId));
      before = page.next ?? undefined;
      pages += 1;
    } while (before);
    expect(pages).toBe(3);
    expect(seen).toHaveLength(entries.length);
    expect(new Set(seen)).toEqual(new Set(entries.map((entry) => entry.subjectId)));
  });

  it('is not disturbed by lines written between two pages', async () => {
    const { site, lead } = await siteWithLog(60);
    const first = await listAudit({ actor: lead }, {});
    await site.withApp((trx) =>
      recordAudit(trx, { actor: lead }, { action: 'policy.edit', subjectType: 'site-policy', subjectId: randomUUID() }),
    );
    const second = await listAudit({ actor: lead }, { before: first.next });
    const ids = new Set([...first.events, ...second.events].map((event) => event.id));
    expect(ids.size).toBe(60);
    expect(second.next).toBeNull();
  });

  it('filters by action, subject, record and actor, and names who acted', async () => {
    const { site, lead, entries } = await siteWithLog(10);
    const other = await activePerson(site, 'lead');
    await editPerson({ actor: other }, { id: lead.userId, version: 1, displayName: 'Renamed Lead', roles: ['lead'] });
    const actions = await listAudit({ actor: lead }, { action: 'scanner.edit' });
    expect(actions.events.map((event) => event.action)).toEqual(Array(5).fill('scanner.edit'));
    expect((await listAudit({ actor: lead }, { subject: 'site-policy' })).events).toHaveLength(5);
    expect((await listAudit({ actor: lead }, { subject: 'scanner', id: entries[1]!.subjectId })).events).toHaveLength(1);
    const byOther = await listAudit({ actor: lead }, { by: other.userId });
    expect(byOther.events).toMatchObject([{ action: 'person.edit', actorName: other.displayName, subjectId: lead.userId, fields: ['displayName'] }]);
  });

  it('drops a filter it cannot read instead of failing', async () => {
    const { lead } = await siteWithLog(2);
    const odd = { action: "x' or true --", subject: ['a', 'b'], id: 'no-id', by: '1', before: '99~x' };
    expect((await listAudit({ actor: lead }, odd)).events).toHaveLength(2);
    const far = { before: `9999999999999999~${randomUUID()}` };
    expect((await listAudit({ actor: lead }, far)).events).toHaveLength(2);
  });

  it('holds field names and never what was in them', async () => {
    const { site, lead } = await siteWithLog(0);
    await editPerson({ actor: lead }, { id: lead.userId, version: 1, displayName: 'Very Particular Name', roles: ['lead', 'educator'] });
    const rows = await site.withApp((trx) => trx.selectFrom('audit_event').selectAll().where('site_id', '=', site.siteId).execute());
    expect(rows).toHaveLength(1);
    expect(JSON.stringify(rows)).not.toMatch(/Particular|educator/);
  });

  it('is for leads of the site alone', async () => {
    const { site } = await siteWithLog(3);
    const others = await activePerson(site, 'radiographer', 'coordinator', 'radiologist', 'educator');
    expect(await outcomeOf(listAudit({ actor: others }, {}))).toMatch(/^not-found/);
    const { lead: foreign } = await siteWithLog(0);
    expect((await listAudit({ actor: foreign }, {})).events).toEqual([]);
  });
});
