import { Plus, Trash2 } from 'lucide-react';
import { useFieldArray } from 'react-hook-form';
import type { Control } from 'react-hook-form';
import { Button, IconButton } from '../../ui/button';
import { FormField } from '../../ui/form';
import { QuantityField } from '../../ui/quantity-field';
import { Select } from '../../ui/select';
import type { BriefFields } from './brief-fields';
import { emptyTone } from './vibration-fields';

const measures = [
  { value: 'peak', label: 'peak' },
  { value: 'rms', label: 'rms' },
] as const;

/** Limits of a vibration document, SI. */
const frequencyLimits = { least: 0.01, most: 1e5 };
const accelerationLimits = { least: 1e-9, most: 1e5 };

interface OneToneProps {
  control: Control<BriefFields>;
  at: 'vibration.tone' | `vibration.tones.${number}`;
  withPhase?: boolean;
}

export function OneTone({ control, at, withPhase }: OneToneProps) {
  return (
    <>
      <FormField control={control} name={`${at}.frequency`}>
        {(bind) => <QuantityField label="Frequency" dimension="frequency" unit="Hz" {...frequencyLimits} {...bind} />}
      </FormField>
      <FormField control={control} name={`${at}.acceleration`}>
        {(bind) => (
          <QuantityField label="Acceleration" dimension="acceleration" unit="m/s²" {...accelerationLimits} {...bind} />
        )}
      </FormField>
      <FormField control={control} name={`${at}.as`}>
        {(bind) => <Select label="Stated as" choices={measures} {...bind} />}
      </FormField>
      {withPhase ? (
        <FormField control={control} name={`${at}.phase`}>
          {(bind) => <QuantityField label="Phase" dimension="angle" unit="deg" {...bind} />}
        </FormField>
      ) : null}
    </>
  );
}

export function ToneList({ control }: { control: Control<BriefFields> }) {
  const { fields, append, remove } = useFieldArray({ control, name: 'vibration.tones' });
  return (
    <div className="flex flex-col gap-3">
      {fields.map((field, index) => (
        <div
          key={field.id}
          role="group"
          aria-label={`Tone ${index + 1}`}
          className="grid grid-cols-2 items-start gap-x-3 gap-y-2 border-b border-rule pb-3 sm:grid-cols-[1fr_1fr_7rem_8rem_auto]"
        >
          <OneTone control={control} at={`vibration.tones.${index}`} withPhase />
          <IconButton
            icon={Trash2}
            label={`Remove tone ${index + 1}`}
            disabled={fields.length === 1}
            onPress={() => remove(index)}
            className="sm:mt-5"
          />
        </div>
      ))}
      <Button size="small" icon={Plus} className="self-start" onPress={() => append(emptyTone())}>
        Add a tone
      </Button>
    </div>
  );
}
