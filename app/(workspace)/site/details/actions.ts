'use server';

import { runAction } from '@/lib/http/run-action';
import type { SiteForm } from '@/lib/schemas/site';
import { editSite } from '@/lib/services/site/edit-site';

export async function saveSite(form: SiteForm) {
  return runAction('edit the site', (context) => editSite(context, form));
}
