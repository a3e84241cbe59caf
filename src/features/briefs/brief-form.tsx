import { useEffect } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import type { Control, UseFormReturn } from 'react-hook-form';
import { Caution } from '../../ui/caution';
import { FieldGroup, Form, FormError, FormField } from '../../ui/form';
import { QuantityField } from '../../ui/quantity-field';
import { RadioGroup } from '../../ui/radio-group';
import { Select } from '../../ui/select';
import { TextArea } from '../../ui/text-area';
import { TextField } from '../../ui/text-field';
import { briefUnits } from './brief-fields';
import type { BriefFields } from './brief-fields';
import { orientationWords } from './brief-words';
import { RequirementRows } from './requirement-rows';
import { SpectrumEditor } from './spectrum-editor';
import { OneTone, ToneList } from './tone-fields';

type BriefControl = Control<BriefFields>;

interface BriefFormProps {
  id: string;
  form: UseFormReturn<BriefFields>;
  onSubmit: () => void;
}

interface BriefFormStart {
  /** What the text is written on. */
  from: BriefFields;
  /** Unsaved text that goes on from it; null where there is none. */
  values: BriefFields | null;
}

/** The form's state, handing every change to the keeper of unsaved text. */
export function useBriefForm(
  { from, values: unsaved }: BriefFormStart,
  keep: (values: BriefFields) => void,
): UseFormReturn<BriefFields> {
  const form = useForm<BriefFields>({ defaultValues: from });
  const { subscribe, reset } = form;
  useEffect(() => {
    if (unsaved !== null) reset(unsaved, { keepDefaultValues: true });
  }, [reset, unsaved]);
  useEffect(
    () =>
      subscribe({
        formState: { values: true, isDirty: true },
        callback: ({ values, isDirty }) => {
          if (isDirty) keep(values);
        },
      }),
    [subscribe, keep],
  );
  return form;
}

/** All that a brief says, in the order in which one asks a customer. */
export function BriefForm({ id, form, onSubmit }: BriefFormProps) {
  const { control } = form;
  return (
    <Form id={id} onSubmit={onSubmit} label="Brief" className="@container max-w-6xl gap-7">
      <FormError message={form.formState.errors.root?.message} />
      <FieldGroup title="What and where">
        <div className="grid gap-x-4 gap-y-3 @xl:grid-cols-2">
          <FormField control={control} name="title">
            {(bind) => (
              <TextField
                label="Title"
                required
                className="@xl:col-span-2"
                hint="What is powered, on which machine."
                {...bind}
              />
            )}
          </FormField>
          <FormField control={control} name="machine">
            {(bind) => <TextField label="Machine" {...bind} />}
          </FormField>
          <FormField control={control} name="place">
            {(bind) => <TextField label="Place on the machine" {...bind} />}
          </FormField>
          <FormField control={control} name="customerContact">
            {(bind) => <TextField label="Contact" hint="Whom to ask about the machine or the node." {...bind} />}
          </FormField>
        </div>
      </FieldGroup>
      <VibrationGroup control={control} />
      <FieldGroup title="What is asked">
        <div className="grid items-start gap-x-4 gap-y-3 @xl:grid-cols-2 @4xl:grid-cols-3">
          <FormField control={control} name="powerNeeded">
            {(bind) => <QuantityField label="Power needed" required {...briefUnits.powerNeeded} {...bind} />}
          </FormField>
          <FormField control={control} name="loadNote">
            {(bind) => <TextField label="By what load" hint="The node, its voltage, how it draws." {...bind} />}
          </FormField>
          <FormField control={control} name="massLimit">
            {(bind) => (
              <QuantityField label="Mass at most" source="no limit stated" {...briefUnits.massLimit} {...bind} />
            )}
          </FormField>
          <FormField control={control} name="temperature.lowest">
            {(bind) => <QuantityField label="Lowest temperature" required {...briefUnits.temperature} {...bind} />}
          </FormField>
          <FormField control={control} name="temperature.highest">
            {(bind) => <QuantityField label="Highest temperature" required {...briefUnits.temperature} {...bind} />}
          </FormField>
          <FormField control={control} name="lifeCycles">
            {(bind) => (
              <QuantityField
                label="Life, in cycles"
                source="not stated"
                placeholder="1e9"
                {...briefUnits.lifeCycles}
                {...bind}
              />
            )}
          </FormField>
          <FormField control={control} name="orientation">
            {(bind) => (
              <Select
                label="Orientation"
                choices={[
                  { value: 'any', label: orientationWords.any },
                  { value: 'horizontal', label: orientationWords.horizontal },
                  { value: 'vertical', label: orientationWords.vertical },
                ]}
                {...bind}
              />
            )}
          </FormField>
        </div>
      </FieldGroup>
      <EnvelopeGroup control={control} />
      <FieldGroup title="Requirements" aside="what a design is held against">
        <RequirementRows form={form} />
      </FieldGroup>
      <FieldGroup title="Notes" className="border-b-0">
        <FormField control={control} name="notes">
          {(bind) => <TextArea label="Notes" labelHidden rows={4} maxLength={10_000} {...bind} />}
        </FormField>
      </FieldGroup>
    </Form>
  );
}

function VibrationGroup({ control }: { control: BriefControl }) {
  const kind = useWatch({ control, name: 'vibration.kind' });
  const kept = useWatch({ control, name: 'vibration.kept' });
  const recording = kept !== null;
  return (
    <FieldGroup title="Vibration" aside="what there is to live on">
      <FormField control={control} name="vibration.kind">
        {(bind) => (
          <RadioGroup
            label="Kind"
            direction="across"
            choices={[
              { value: 'tone', label: 'One tone' },
              { value: 'tones', label: 'Several tones' },
              { value: 'spectrum', label: 'Spectrum' },
              { value: 'recording', label: 'Recording', disabled: !recording },
            ]}
            hint={
              recording
                ? undefined
                : 'A recording cannot be entered here yet; state its strongest tones or its spectrum.'
            }
            {...bind}
            onChange={(next) => {
              if (next !== '') bind.onChange(next);
            }}
          />
        )}
      </FormField>
      <div className="pt-2">
        {kind === 'tone' ? (
          <div className="grid max-w-2xl grid-cols-2 items-start gap-x-3 gap-y-3 sm:grid-cols-[1fr_1fr_8rem]">
            <OneTone control={control} at="vibration.tone" />
          </div>
        ) : null}
        {kind === 'tones' ? <ToneList control={control} /> : null}
        {kind === 'spectrum' ? <SpectrumEditor control={control} /> : null}
        {kind === 'recording' ? (
          <Caution severity="info">
            The recording of this brief is kept as it is; its samples cannot be edited here.
          </Caution>
        ) : null}
      </div>
    </FieldGroup>
  );
}

const sides = ['Length', 'Width', 'Height'] as const;

function EnvelopeGroup({ control }: { control: BriefControl }) {
  const shape = useWatch({ control, name: 'envelope.shape' });
  const length = (label: string, name: 'envelope.diameter' | 'envelope.length' | `envelope.size.${0 | 1 | 2}`) => (
    <FormField key={name} control={control} name={name}>
      {(bind) => <QuantityField label={label} required {...briefUnits.length} {...bind} />}
    </FormField>
  );
  return (
    <FieldGroup title="Envelope" aside="the space it may take">
      <FormField control={control} name="envelope.shape">
        {(bind) => (
          <RadioGroup
            label="Shape"
            direction="across"
            choices={[
              { value: 'cylinder', label: 'Cylinder' },
              { value: 'box', label: 'Box' },
            ]}
            {...bind}
            onChange={(next) => {
              if (next !== '') bind.onChange(next);
            }}
          />
        )}
      </FormField>
      <div className="grid max-w-2xl grid-cols-2 items-start gap-x-3 gap-y-3 pt-2 sm:grid-cols-3">
        {shape === 'cylinder'
          ? [length('Diameter', 'envelope.diameter'), length('Length', 'envelope.length')]
          : sides.map((label, index) => length(label, `envelope.size.${index as 0 | 1 | 2}`))}
      </div>
    </FieldGroup>
  );
}
