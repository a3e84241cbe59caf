import { useId, useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import type { Instrument } from '#contracts/instruments';
import { requirementQuantities } from '#contracts/requirement';
import type { RequirementQuantity } from '#contracts/requirement';
import type { Run } from '#contracts/runs';
import { formatDate } from '../../lib/format';
import { RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Caution } from '../../ui/caution';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { QuantityField } from '../../ui/quantity-field';
import { Select } from '../../ui/select';
import { TextArea } from '../../ui/text-area';
import { tell } from '../../ui/toast';
import { useAddReading } from './queries';
import { emptyReading, measuredAs, readReading } from './reading-fields';
import type { ReadingFields } from './reading-fields';

interface ReadingDialogProps {
  run: Run;
  instruments: readonly Instrument[];
  /** Requirement that the reading is taken for; '' for one that is taken for information. */
  requirementId: string;
  /** Instrument of the reading before, which is mostly the one of this. */
  instrumentId: string;
  onInstrument: (instrumentId: string) => void;
  onClose: () => void;
}

const quantities = (Object.keys(requirementQuantities) as RequirementQuantity[]).map((value) => ({
  value,
  label: requirementQuantities[value].label,
}));
const large = 'max-sm:[&_.field-box]:min-h-12';

/** Entry of one reading by hand. Readings are never changed afterwards, only struck through. */
export function ReadingDialog({
  run,
  instruments,
  requirementId,
  instrumentId,
  onInstrument,
  onClose,
}: ReadingDialogProps) {
  const requirements = run.lines.map(({ requirement }) => requirement);
  const form = useForm<ReadingFields>({
    defaultValues: emptyReading(
      requirements.find(({ id }) => id === requirementId),
      instrumentId,
    ),
  });
  const { control } = form;
  const add = useAddReading(run.id);
  const formId = useId();
  const [another, setAnother] = useState(false);
  const watched = useWatch({ control });
  const chosen = { requirementId: watched.requirementId ?? '', quantity: watched.quantity ?? 'loadPower' };
  const { dimension, unit } = measuredAs(chosen, requirements);
  const instrument = instruments.find(({ id }) => id === watched.instrumentId);

  const submit = (again: boolean) =>
    form.handleSubmit(async (fields) => {
      setAnother(again);
      try {
        const reading = await readReading(fields, requirements, instruments);
        if (!reading.ok)
          throw new RequestError(422, 'invalid', 'The reading is not complete.', { issues: reading.issues });
        await add.mutateAsync(reading.body);
        tell.done('Reading entered');
        onInstrument(fields.instrumentId);
        if (!again) onClose();
        else {
          form.reset({ ...fields, value: '', note: '' });
          form.setFocus('value');
        }
      } catch (error) {
        // The unit stands in the text of the reading.
        applyIssues(form, error, { rename: (path) => (path === 'unit' || path === 'quantity' ? 'value' : path) });
      }
    });

  return (
    <Dialog
      title="Enter a reading"
      isOpen
      onClose={onClose}
      role="alertdialog"
      footer={
        <>
          <Button
            onPress={() => void submit(true)()}
            pending={add.isPending && another}
            className="max-sm:min-h-12 max-sm:w-full"
          >
            Enter and take another
          </Button>
          <Button
            variant="primary"
            type="submit"
            form={formId}
            pending={add.isPending && !another}
            className="max-sm:min-h-12 max-sm:w-full"
          >
            Enter the reading
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit(false)()} label="Reading" className={large}>
        <FormError message={form.formState.errors.root?.message} />
        <FormField control={control} name="requirementId">
          {(bind) => (
            <Select
              label="Counts for"
              placeholder="No requirement, for information"
              choices={requirements.map(({ id, title }) => ({ value: id, label: title }))}
              {...bind}
            />
          )}
        </FormField>
        {chosen.requirementId === '' ? (
          <FormField control={control} name="quantity">
            {(bind) => <Select label="What was measured" choices={quantities} {...bind} />}
          </FormField>
        ) : null}
        <FormField control={control} name="value">
          {(bind) => <QuantityField label="Reading" required dimension={dimension} unit={unit} autoFocus {...bind} />}
        </FormField>
        <FormField control={control} name="instrumentId">
          {(bind) => (
            <Select
              label="Instrument"
              required
              placeholder="Choose"
              choices={instruments.map(({ id, number, name, inCalibration }) => ({
                value: id,
                label: `${number} ${name}${inCalibration ? '' : ' (out of calibration)'}`,
              }))}
              hint={instrument ? instrument.uncertainty || undefined : undefined}
              {...bind}
            />
          )}
        </FormField>
        {instruments.length === 0 ? (
          <Caution>No instrument is registered. Register one under Bench first.</Caution>
        ) : null}
        {instrument && !instrument.inCalibration ? (
          <>
            <Caution
              title={`${instrument.number} has been out of calibration since ${formatDate(instrument.calibrationDue)}.`}
            >
              A reading with it is marked, in the run and in the record of a release.
            </Caution>
            <FormField control={control} name="outOfCalibrationReason">
              {(bind) => <TextArea label="Why it was used all the same" required rows={2} {...bind} />}
            </FormField>
          </>
        ) : null}
        <FormField control={control} name="note">
          {(bind) => (
            <TextArea label="Note" rows={2} hint="Range, averaging, what was odd. May stay empty." {...bind} />
          )}
        </FormField>
      </Form>
    </Dialog>
  );
}
