import { useId, useState } from 'react';
import { useForm } from 'react-hook-form';
import { InstrumentCreate } from '#contracts/instruments';
import type { Instrument } from '#contracts/instruments';
import { isRequestError, RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { TextField } from '../../ui/text-field';
import { tell } from '../../ui/toast';
import { useSaveInstrument } from './queries';

interface InstrumentDialogProps {
  /** The instrument that is changed; null for a new one. */
  instrument: Instrument | null;
  onClose: () => void;
}

const fieldsOf = (instrument: Instrument | null): InstrumentCreate => ({
  name: instrument?.name ?? '',
  serial: instrument?.serial ?? '',
  location: instrument?.location ?? '',
  calibrationDue: instrument?.calibrationDue ?? '',
  uncertainty: instrument?.uncertainty ?? '',
});

export function InstrumentDialog({ instrument, onClose }: InstrumentDialogProps) {
  const form = useForm<InstrumentCreate>({ defaultValues: fieldsOf(instrument) });
  const save = useSaveInstrument();
  const formId = useId();
  const [stale, setStale] = useState(false);
  const submit = form.handleSubmit(async (fields) => {
    const parsed = InstrumentCreate.safeParse(fields);
    if (!parsed.success) {
      const issues = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
      applyIssues(form, new RequestError(422, 'invalid', 'Not complete.', { issues }));
      return;
    }
    try {
      const saved = await save.mutateAsync(
        instrument === null
          ? { instrumentId: null, body: parsed.data }
          : { instrumentId: instrument.id, body: { version: instrument.version, ...parsed.data } },
      );
      tell.done(`${saved.number} saved`);
      onClose();
    } catch (error) {
      if (isRequestError(error, 'conflict')) setStale(true);
      applyIssues(form, error);
    }
  });
  return (
    <Dialog
      title={instrument === null ? 'Register an instrument' : `Change ${instrument.number}`}
      isOpen
      onClose={onClose}
      role="alertdialog"
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button variant="primary" type="submit" form={formId} pending={save.isPending} disabled={stale}>
            Save
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label="Instrument">
        <FormError message={form.formState.errors.root?.message} />
        {stale ? (
          <p>Close this and open it again to see what changed; your text stays here to copy until then.</p>
        ) : null}
        <FormField control={form.control} name="name">
          {(bind) => (
            <TextField
              label="Instrument"
              required
              autoFocus
              hint="What it is, e.g. “True-rms multimeter, 6½ digits”."
              {...bind}
            />
          )}
        </FormField>
        <FormField control={form.control} name="serial">
          {(bind) => <TextField label="Serial number" required mono {...bind} />}
        </FormField>
        <FormField control={form.control} name="location">
          {(bind) => <TextField label="Where it is kept" {...bind} />}
        </FormField>
        <FormField control={form.control} name="calibrationDue">
          {(bind) => <TextField label="Calibration holds until" type="date" required {...bind} />}
        </FormField>
        <FormField control={form.control} name="uncertainty">
          {(bind) => <TextField label="Uncertainty as stated" hint="E.g. “0.5 % of reading, k = 2”." {...bind} />}
        </FormField>
      </Form>
    </Dialog>
  );
}
