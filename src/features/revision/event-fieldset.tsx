import type { Control } from 'react-hook-form';
import type { RevisionEventType } from '#workflows/revision';
import { Checkbox } from '../../ui/checkbox';
import { ComboBox } from '../../ui/combo-box';
import { FormField } from '../../ui/form';
import { RadioGroup } from '../../ui/radio-group';
import type { Choice } from '../../ui/select';
import { TextArea } from '../../ui/text-area';
import { TextField } from '../../ui/text-field';
import { eventForms } from './event-forms';
import type { EventFieldName, EventFields } from './event-forms';

interface EventFieldsetProps {
  event: RevisionEventType;
  control: Control<EventFields>;
  targets: readonly Choice[];
}

const results: readonly Choice<'conforming' | 'nonconforming'>[] = [
  { value: 'conforming', label: 'Conforming', detail: 'Every bench requirement is met by its readings.' },
  { value: 'nonconforming', label: 'Nonconforming', detail: 'At least one requirement is missed.' },
];

const mayStayEmpty: ReadonlySet<EventFieldName> = new Set(['note', 'target', 'blocking']);

/** The fields that a step asks for, apart from the signature. */
export function EventFieldset({ event, control, targets }: EventFieldsetProps) {
  const { fields, labels, hints } = eventForms[event];
  const [first] = fields.filter((name) => name !== 'target' && name !== 'password');
  return (
    <>
      {fields.map((name) => {
        const label = labels?.[name] ?? name;
        const hint = hints?.[name];
        if (name === 'password') return null;
        if (name === 'blocking')
          return (
            <FormField key={name} control={control} name={name}>
              {(bind) => <Checkbox label={label} hint={hint} {...bind} />}
            </FormField>
          );
        if (name === 'result')
          return (
            <FormField key={name} control={control} name={name}>
              {(bind) => <RadioGroup label={label} hint={hint} choices={results} required {...bind} />}
            </FormField>
          );
        if (name === 'target')
          return targets.length === 0 ? null : (
            <FormField key={name} control={control} name={name}>
              {(bind) => (
                <ComboBox
                  label={label}
                  placeholder="The revision as a whole"
                  choices={targets}
                  hint="A value or a result; empty means the whole."
                  {...bind}
                />
              )}
            </FormField>
          );
        if (name === 'specimen')
          return (
            <FormField key={name} control={control} name={name}>
              {(bind) => <TextField label={label} hint={hint} required mono autoFocus={name === first} {...bind} />}
            </FormField>
          );
        const optional = mayStayEmpty.has(name) || (name === 'statement' && event === 'release');
        return (
          <FormField key={name} control={control} name={name}>
            {(bind) => <TextArea label={label} hint={hint} required={!optional} autoFocus={name === first} {...bind} />}
          </FormField>
        );
      })}
    </>
  );
}
