'use client';

import { useFieldArray, useFormContext } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { FieldGroup } from '@/components/ui/field';
import { FormMessage, FormNumber, FormText, useReadOnly } from '@/components/ui/form';
import { Panel } from '@/components/ui/panel';
import { coilElementShape } from '@/lib/schemas/case/scanner';
import type { ScannerForm } from '@/lib/schemas/scanner';

const NEW_ELEMENT = { name: '', seesFromMm: -100, seesToMm: 100 };

/** Which elements a coil has and how far each sees along the bore: then a remedy may leave some of them out. */
export function CoilsGroup() {
  const { control } = useFormContext<ScannerForm>();
  const { fields, append, remove } = useFieldArray({ control, name: 'scanner.coils' });
  const readOnly = useReadOnly();
  return (
    <Panel title="Coils and their elements">
      <p className="mb-4 max-w-prose text-ink-soft">
        Optional. An element left out no longer sees tissue at its end of the bore, so that tissue cannot fold.
        Of a coil that is not described here, every element counts as used.
      </p>
      <div className="space-y-6">
        {fields.map((field, index) => (
          <FieldGroup key={field.id} legend={`Coil ${index + 1}`}>
            <FormText
              name={`scanner.coils.${index}.name`}
              label="Name"
              hint="As the sequences of your protocols name it"
              className="max-w-sm"
              required
            />
            <Elements coil={index} />
            {!readOnly && (
              <Button variant="quiet" onClick={() => remove(index)}>
                Remove coil {index + 1}
              </Button>
            )}
          </FieldGroup>
        ))}
      </div>
      <FormMessage name="scanner.coils" />
      {!readOnly && (
        <Button className="mt-4" onClick={() => append({ name: '', elements: [NEW_ELEMENT] })}>
          Describe a coil
        </Button>
      )}
    </Panel>
  );
}

function Elements({ coil }: { coil: number }) {
  const { control } = useFormContext<ScannerForm>();
  const { fields, append, remove } = useFieldArray({ control, name: `scanner.coils.${coil}.elements` });
  const readOnly = useReadOnly();
  return (
    <div className="mt-4 space-y-4">
      {fields.map((field, index) => (
        <div key={field.id} className="grid items-end gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-4">
          <FormText name={`scanner.coils.${coil}.elements.${index}.name`} label={`Element ${index + 1}`} required />
          <FormNumber
            name={`scanner.coils.${coil}.elements.${index}.seesFromMm`}
            schema={coilElementShape.seesFromMm}
            label="Sees from"
            hint="from the isocentre, feet negative"
          />
          <FormNumber
            name={`scanner.coils.${coil}.elements.${index}.seesToMm`}
            schema={coilElementShape.seesToMm}
            label="Sees up to"
            hint="from the isocentre, head positive"
          />
          {!readOnly && fields.length > 1 && (
            <Button variant="quiet" onClick={() => remove(index)}>
              Remove element {index + 1}
            </Button>
          )}
        </div>
      ))}
      {!readOnly && (
        <Button variant="quiet" onClick={() => append(NEW_ELEMENT)}>
          Add an element
        </Button>
      )}
    </div>
  );
}
