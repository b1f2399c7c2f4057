'use client';

import { useFieldArray, useFormContext } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { FormNumber, FormSelect, useReadOnly } from '@/components/ui/form';
import { PlusIcon } from '@/components/ui/icons';
import { Panel } from '@/components/ui/panel';
import { presaturationShape } from '@/lib/schemas/case/prescription';
import { GRID, type GroupProps } from './sequence-groups';

const SIDES = ['anterior', 'posterior', 'right', 'left', 'superior', 'inferior'] as const;

export function PresaturationGroup({ at, refused }: GroupProps) {
  const { control } = useFormContext();
  const { fields, append, remove } = useFieldArray({ control, name: `${at}.presaturation` });
  const readOnly = useReadOnly();
  return (
    <Panel
      level={4}
      title="Presaturation bands"
      collapsible
      defaultOpen={false}
      summary={fields.length === 0 ? 'none' : fields.length === 1 ? '1 band' : `${fields.length} bands`}
      open={refused(['presaturation']) || undefined}
    >
      <ul className="space-y-5">
        {fields.map((field, index) => (
          <li key={field.id} className={GRID}>
            <FormSelect
              name={`${at}.presaturation.${index}.side`}
              label="Side"
              options={SIDES.map((side) => ({ value: side, label: side }))}
            />
            <FormNumber
              name={`${at}.presaturation.${index}.innerEdgeMm`}
              schema={presaturationShape.innerEdgeMm}
              label="Inner edge from the origin"
            />
            <FormNumber
              name={`${at}.presaturation.${index}.thicknessMm`}
              schema={presaturationShape.thicknessMm}
              label="Thickness"
            />
            <FormNumber
              name={`${at}.presaturation.${index}.nominalFlipDeg`}
              schema={presaturationShape.nominalFlipDeg}
              label="Flip angle"
            />
            <FormNumber
              name={`${at}.presaturation.${index}.delayMs`}
              schema={presaturationShape.delayMs}
              label="Delay to excitation"
            />
            <div className="self-center">
              {!readOnly && (
                <Button variant="quiet" size="sm" onClick={() => remove(index)}>
                  Remove band {index + 1}
                </Button>
              )}
            </div>
          </li>
        ))}
      </ul>
      {!readOnly && fields.length < 6 && (
        <Button
          size="sm"
          className="mt-3"
          onClick={() =>
            append({ side: 'anterior', innerEdgeMm: 120, thicknessMm: 60, nominalFlipDeg: 90, delayMs: 10 })
          }
        >
          <PlusIcon /> Add a band
        </Button>
      )}
    </Panel>
  );
}
