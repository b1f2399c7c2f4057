'use client';

import { FieldGroup } from '@/components/ui/field';
import { FormCheckbox, FormNumber } from '@/components/ui/form';
import { Panel } from '@/components/ui/panel';
import { numberFacts, schemaAt } from '@/components/ui/schema-facts';
import { marginShape, policyShape, swapShape, tissueT1Shape, weightsShape } from '@/lib/schemas/case/policy';
import { REGION_WORDS } from '@/lib/presentation/anatomy-words';
import type { BodyRegion } from '@/lib/physics/model/patient';
import type { Side } from '@/lib/physics/model/axes';
import { pathwayShape, policyFormSchema } from '@/lib/schemas/site-policy';

const GRID = 'grid gap-x-6 gap-y-5 sm:grid-cols-2 lg:grid-cols-3';

const SIDES: readonly Side[] = ['anterior', 'posterior', 'right', 'left', 'superior', 'inferior'];

export function MarginGroup() {
  return (
    <Panel title="Safety margin">
      <p className="mb-4 max-w-prose text-ink-soft">
        Tissue is widened by this much on each side before it is folded. Breathing moves the front wall most.
      </p>
      <div className={GRID}>
        {SIDES.map((side) => (
          <FormNumber
            key={side}
            name={`marginMm.${side}`}
            schema={marginShape[side]}
            label={side[0]!.toUpperCase() + side.slice(1)}
          />
        ))}
      </div>
    </Panel>
  );
}

export function CertaintyGroup() {
  return (
    <Panel title="How sure, and from what">
      <div className={GRID}>
        <FormNumber
          name="sureAt"
          schema={policyShape.sureAt}
          label="A verdict must be sure at"
          hint="0.5 to 0.999; 0.95 means 95 of 100 such patients"
          step={0.01}
        />
        <FormNumber
          name="readingExpiryDays"
          schema={policyShape.readingExpiryDays}
          label="Sizes are asked for again after"
          step={5}
        />
        <FormNumber
          name="setUpMinutes"
          schema={pathwayShape.setUpMinutes}
          label="Set-up counted beside the scan"
          hint="Positioning, coils and pauses; part of every slot"
          step={5}
        />
        <FormNumber
          name="tolerateFoldOutsidePct"
          schema={policyShape.tolerateFoldOutsidePct}
          label="Fold outside the area a remedy may leave"
          hint="0 to 100 % of the picture"
          step={5}
        />
      </div>
      <div className="mt-4 space-y-2">
        <FormCheckbox
          name="strictBreathHold"
          label="A hold beyond the patient’s limit rules a remedy out"
          hint="If not, it only costs points."
        />
        <FormCheckbox
          name="signOffAlways"
          label="Every plan needs a radiologist’s sign-off"
          hint="If not, only plans with fold left in the keep-clear area do."
        />
      </div>
    </Panel>
  );
}

export function ModelGroup() {
  return (
    <Panel title="What counts as fold">
      <div className={GRID}>
        <FormNumber
          name="tissueTolerance"
          schema={policyShape.tissueTolerance}
          label="Tissue counts above"
          hint="0 to 1, share of the trunk’s signal"
          step={0.01}
        />
        <FormNumber
          name="slabTolerance"
          schema={policyShape.slabTolerance}
          label="A partition is contaminated above"
          hint="0.001 to 1, share of the plateau"
          step={0.01}
        />
        <FormNumber
          name="unknownTimeBandwidthProduct"
          schema={policyShape.unknownTimeBandwidthProduct}
          label="Time-bandwidth product when unknown"
          hint="1 to 40; smaller is more cautious"
          step={0.5}
        />
        <FormNumber
          name="presaturationB1Scale"
          schema={policyShape.presaturationB1Scale}
          label="True flip of presaturation bands"
          hint="0.3 to 2 of nominal; empty: not measured, 0.8"
          step={0.05}
        />
        <FormNumber name="tissueT1Ms.parenchyma" schema={tissueT1Shape.parenchyma} step={10} />
        <FormNumber name="tissueT1Ms.fat" schema={tissueT1Shape.fat} step={10} />
      </div>
      <FieldGroup
        className="mt-6"
        legend="Geometry factor where aliases overlap"
        hint="From and to, used while a coil has no table of its own."
      >
        <div className={GRID}>
          {(['2', '3', '4'] as const).flatMap((overlap) =>
            [0, 1].map((end) => (
              <FormNumber
                key={`${overlap}${end}`}
                name={`geometryFactorByOverlap.${overlap}.${end}`}
                schema={schemaAt(policyFormSchema, ['geometryFactorByOverlap', overlap, String(end)])!}
                label={`${overlap} overlapping, ${end === 0 ? 'from' : 'to'}`}
                step={0.1}
              />
            )),
          )}
        </div>
      </FieldGroup>
    </Panel>
  );
}

const WEIGHTS = (Object.keys(weightsShape) as (keyof typeof weightsShape)[]).filter(
  (key): key is Exclude<keyof typeof weightsShape, 'swap'> => key !== 'swap',
);

export function WeightGroup() {
  return (
    <Panel title="Cost points">
      <p className="mb-4 max-w-prose text-ink-soft">
        One point is as bad as 1 % more scan time. Remedies are ranked by their sum.
      </p>
      <div className="grid gap-x-10 gap-y-3 lg:grid-cols-2">
        {WEIGHTS.map((key) => (
          <FormNumber
            key={key}
            name={`weights.${key}`}
            schema={weightsShape[key]}
            label={numberFacts(weightsShape[key]).text}
            hint={null}
            layout="row"
            compact
            step={0.1}
          />
        ))}
      </div>
      <FieldGroup className="mt-6" legend="Swapping the phase direction, by body part">
        <div className="grid gap-x-10 gap-y-3 sm:grid-cols-2 lg:grid-cols-4">
          {(Object.keys(swapShape) as BodyRegion[]).map((region) => (
            <FormNumber
              key={region}
              name={`weights.swap.${region}`}
              schema={swapShape[region]}
              label={REGION_WORDS[region]}
              hint={null}
              layout="row"
              compact
            />
          ))}
        </div>
      </FieldGroup>
    </Panel>
  );
}
