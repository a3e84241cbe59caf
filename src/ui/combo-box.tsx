import { ChevronDown } from 'lucide-react';
import type { Ref } from 'react';
import { Button } from 'react-aria-components/Button';
import { ComboBox as AriaComboBox } from 'react-aria-components/ComboBox';
import { Input } from 'react-aria-components/Input';
import { Label } from 'react-aria-components/Label';
import { ListBox, ListBoxItem } from 'react-aria-components/ListBox';
import { Popover } from 'react-aria-components/Popover';
import { Text } from 'react-aria-components/Text';
import { classNames } from './class-names';
import type { BoundProps, FieldProps } from './field';
import type { Choice } from './select';

export interface ComboBoxProps<T extends string> extends FieldProps, BoundProps<T | ''> {
  choices: readonly Choice<T>[];
  placeholder?: string;
  mono?: boolean;
}

/** One of many, found by typing. */
export function ComboBox<T extends string>(props: ComboBoxProps<T>) {
  const { value, onChange, onBlur, name, ref, label, hint, error, required, disabled, choices, className } = props;
  const inline = props.layout === 'inline' && !props.labelHidden;
  return (
    <AriaComboBox
      value={value === '' ? null : value}
      onChange={(key) => onChange(key === null ? '' : (String(key) as T))}
      onBlur={onBlur}
      name={name}
      isDisabled={disabled}
      isInvalid={error !== undefined}
      isRequired={required}
      validationBehavior="aria"
      menuTrigger="focus"
      className={classNames(
        inline
          ? 'grid grid-cols-[minmax(5.5rem,9fr)_minmax(0,13fr)] items-start gap-x-2 gap-y-0.5'
          : 'flex flex-col gap-1',
        className,
      )}
    >
      <Label
        className={classNames(
          props.labelHidden && 'sr-only',
          inline ? 'pt-1.5 leading-tight text-graphite' : 'leading-tight font-medium',
        )}
      >
        {label}
        {required && !inline ? <span className="font-normal text-graphite"> (required)</span> : null}
      </Label>
      <span className="field-box" data-invalid={error ? '' : undefined} data-disabled={disabled ? '' : undefined}>
        <Input
          ref={ref as Ref<HTMLInputElement>}
          placeholder={props.placeholder}
          className={classNames('pr-0!', props.mono && 'font-mono')}
        />
        <Button className="grid w-8 shrink-0 place-items-center self-stretch" aria-label={`Choices for ${label}`}>
          <ChevronDown aria-hidden className="size-4 text-graphite" />
        </Button>
      </span>
      {error ? (
        <Text slot="errorMessage" className={classNames('text-sm text-cinnabar', inline && 'col-span-2 text-right')}>
          <span aria-hidden className="mr-1 font-bold">
            ×
          </span>
          {error}
        </Text>
      ) : null}
      {hint ? (
        <Text slot="description" className={classNames('text-sm text-graphite', inline && 'col-span-2 text-right')}>
          {hint}
        </Text>
      ) : null}
      <Popover className="sheet max-h-80 w-(--trigger-width) min-w-56 overflow-auto p-1 shadow-(--lift)">
        <ListBox
          items={choices.map((choice) => ({ id: choice.value, ...choice }))}
          renderEmptyState={() => <p className="px-2.5 py-1.5 text-graphite">Nothing matches.</p>}
        >
          {(choice) => (
            <ListBoxItem
              id={choice.value}
              textValue={choice.label}
              isDisabled={choice.disabled}
              className="cursor-pointer rounded px-2.5 py-1.5 data-[disabled]:text-graphite data-[focused]:bg-wash data-[selected]:font-semibold data-[selected]:shadow-[inset_3px_0_0_var(--copper)]"
            >
              <span className={classNames(props.mono && 'font-mono')}>{choice.label}</span>
              {choice.detail ? <span className="block text-sm font-normal text-graphite">{choice.detail}</span> : null}
            </ListBoxItem>
          )}
        </ListBox>
      </Popover>
    </AriaComboBox>
  );
}
