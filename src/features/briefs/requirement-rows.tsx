import { Plus, Trash2 } from 'lucide-react';
import { useFieldArray, useWatch } from 'react-hook-form';
import type { UseFormReturn } from 'react-hook-form';
import { comparisonSign, requirementQuantities, shownByWords } from '#contracts/requirement';
import type { Comparison, RequirementQuantity, ShownBy } from '#contracts/requirement';
import { Button, IconButton } from '../../ui/button';
import { FormField } from '../../ui/form';
import { QuantityField } from '../../ui/quantity-field';
import { Select } from '../../ui/select';
import { TextField } from '../../ui/text-field';
import { emptyRequirement, requirementUnit } from './brief-fields';
import type { BriefFields } from './brief-fields';

const quantities = (Object.keys(requirementQuantities) as RequirementQuantity[]).map((value) => ({
  value,
  label: requirementQuantities[value].label,
}));
const comparisons = (Object.keys(comparisonSign) as Comparison[]).map((value) => ({
  value,
  label: `${comparisonSign[value]} ${value === 'atLeast' ? 'at least' : 'at most'}`,
}));
const shownBy = (Object.keys(shownByWords) as ShownBy[]).map((value) => ({ value, label: shownByWords[value] }));

type BriefFormReturn = UseFormReturn<BriefFields>;

/** The requirements of a brief, one a row. */
export function RequirementRows({ form }: { form: BriefFormReturn }) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'requirements', keyName: 'key' });
  return (
    <div className="flex flex-col gap-3">
      {fields.length === 0 ? (
        <p className="text-graphite">
          No requirements. A requirement is one line that an estimate or a bench run can be held against.
        </p>
      ) : null}
      {fields.map((field, index) => (
        <RequirementRow key={field.key} form={form} index={index} onRemove={() => remove(index)} />
      ))}
      <Button size="small" icon={Plus} className="self-start" onPress={() => append(emptyRequirement())}>
        Add a requirement
      </Button>
    </div>
  );
}

interface RowProps {
  form: BriefFormReturn;
  index: number;
  onRemove: () => void;
}

function RequirementRow({ form, index, onRemove }: RowProps) {
  const { control } = form;
  const quantity = useWatch({ control, name: `requirements.${index}.quantity` });
  const { dimension, label } = requirementQuantities[quantity];
  // A title that only repeats the quantity follows it.
  const choose = (next: RequirementQuantity) => {
    const title = form.getValues(`requirements.${index}.title`).trim();
    if (title === '' || title === label)
      form.setValue(`requirements.${index}.title`, requirementQuantities[next].label);
  };
  return (
    <div
      role="group"
      aria-label={`Requirement ${index + 1}`}
      className="grid grid-cols-2 items-start gap-x-3 gap-y-2 border-b border-rule pb-3 @3xl:grid-cols-[minmax(0,3fr)_minmax(0,3fr)_7.75rem_minmax(0,2fr)_12rem_auto]"
    >
      <FormField control={control} name={`requirements.${index}.quantity`}>
        {(bind) => (
          <Select
            label="Quantity"
            choices={quantities}
            className="col-span-2 @3xl:col-span-1"
            {...bind}
            onChange={(next) => {
              choose(next);
              bind.onChange(next);
            }}
          />
        )}
      </FormField>
      <FormField control={control} name={`requirements.${index}.title`}>
        {(bind) => <TextField label="Title" className="col-span-2 @3xl:col-span-1" {...bind} />}
      </FormField>
      <FormField control={control} name={`requirements.${index}.comparison`}>
        {(bind) => <Select label="Comparison" choices={comparisons} {...bind} />}
      </FormField>
      <FormField control={control} name={`requirements.${index}.limit`}>
        {(bind) => <QuantityField label="Limit" dimension={dimension} unit={requirementUnit(quantity)} {...bind} />}
      </FormField>
      <FormField control={control} name={`requirements.${index}.shownBy`}>
        {(bind) => <Select label="Shown by" choices={shownBy} {...bind} />}
      </FormField>
      <IconButton
        icon={Trash2}
        label={`Remove requirement ${index + 1}`}
        onPress={onRemove}
        className="self-end @3xl:mt-5 @3xl:self-start"
      />
    </div>
  );
}
