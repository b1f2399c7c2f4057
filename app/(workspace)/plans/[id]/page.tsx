import type { Metadata } from 'next';
import { OutcomeSection } from '@/components/outcome/outcome-section';
import { NewerVersion } from '@/components/plan/newer-version';
import { PlanOverview } from '@/components/plan/plan-overview';
import { PlanSteps } from '@/components/plan/plan-steps';
import { PlanVersions } from '@/components/plan/plan-versions';
import { signOffWords } from '@/components/plan/sign-off-words';
import { SignOffForm } from '@/components/plan/sign-off-form';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { asVersion } from '@/lib/http/as-version';
import { loadPage } from '@/lib/http/load-page';
import { benchOfPlan } from '@/lib/presentation/bench-of-plan';
import { recentVersions } from '@/lib/presentation/recent-versions';
import { listOutcomes } from '@/lib/services/outcome/list-outcomes';
import { getPlan } from '@/lib/services/plan/get-plan';
import { movePlanAction, recordOutcomeAction, signOffAction } from '../actions';

export const metadata: Metadata = { title: 'Plan' };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<{ version?: string }>;
}

export default async function PlanPage({ params, searchParams }: Props) {
  const [{ id }, query] = await Promise.all([params, searchParams]);
  const { plan, versions, outcomes, may } = await loadPage(async (context) => {
    const plan = await getPlan(context, { id, version: asVersion(query.version) });
    return {
      plan,
      versions: await Promise.all(recentVersions(plan.currentVersion).map((version) => getPlan(context, { id, version }))),
      outcomes: (await listOutcomes(context, { planId: id })).outcomes,
      may: {
        plan: mayAttempt(context.actor, 'plan.release'),
        sign: mayAttempt(context.actor, 'plan.sign-off'),
        record: mayAttempt(context.actor, 'outcome.record'),
      },
    };
  });
  const sheet = `/plans/${id}/sheet${plan.newerVersionExists ? `?version=${plan.version}` : ''}`;
  return (
    <PageBody>
      <PageHeader
        title={plan.accession ?? 'Plan without a booking'}
        lead={`Plan, version ${plan.version}, ${plan.state}`}
        actions={
          <>
            <LinkButton href={benchOfPlan(plan)}>Open on the bench</LinkButton>
            <LinkButton variant="primary" href={sheet}>
              Plan sheet
            </LinkButton>
          </>
        }
      />
      <NewerVersion plan={plan} href={`/plans/${id}`} />
      <PlanOverview plan={plan} />
      {may.sign && !plan.newerVersionExists && plan.state === 'for use' && (
        <SignOffForm version={plan.version} why={signOffWords(plan)} decide={signOffAction.bind(null, id, plan.version)} />
      )}
      <OutcomeSection
        className="mt-6"
        plan={plan}
        outcomes={outcomes}
        record={may.record ? recordOutcomeAction.bind(null, id, plan.version) : undefined}
      />
      {may.plan && !plan.newerVersionExists && <PlanSteps plan={plan} move={movePlanAction.bind(null, id, plan.version)} />}
      <PlanVersions versions={versions} current={plan.version} href={`/plans/${id}`} />
    </PageBody>
  );
}
