import { useForm } from 'react-hook-form';
import { Conditions } from '#contracts/runs';
import type { Run } from '#contracts/runs';
import type { Issue } from '#contracts/error';
import { readQuantityFully } from '../../lib/quantities';
import { RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { KeyFigures } from '../../ui/key-figures';
import { NumberField } from '../../ui/number-field';
import { Quantity } from '../../ui/quantity';
import { QuantityField } from '../../ui/quantity-field';
import { TextField } from '../../ui/text-field';
import { tell } from '../../ui/toast';
import { useRecordConditions } from './queries';

interface ConditionFields {
  temperature: string;
  humidity: number | null;
  fixture: string;
}

/** Conditions of a run: entered while it is open, read afterwards. */
export function RunConditions({ run }: { run: Run }) {
  const { conditions } = run;
  if (run.mayRecord) return <ConditionsForm run={run} />;
  if (conditions === null) return <p className="text-graphite">Not stated.</p>;
  return (
    <KeyFigures
      ruled
      figures={[
        {
          label: 'Temperature',
          value: <Quantity value={conditions.temperature} dimension="temperature" absent="not stated" />,
        },
        { label: 'Humidity', value: conditions.humidity === null ? 'not stated' : `${conditions.humidity} %` },
        { label: 'Fixture', value: conditions.fixture || 'not stated' },
      ]}
    />
  );
}

function ConditionsForm({ run }: { run: Run }) {
  const { conditions } = run;
  const record = useRecordConditions(run.id);
  const form = useForm<ConditionFields>({
    defaultValues: {
      temperature: conditions === null || conditions.temperature === null ? '' : `${conditions.temperature} °C`,
      humidity: conditions?.humidity ?? null,
      fixture: conditions?.fixture ?? '',
    },
  });
  const submit = form.handleSubmit(async (fields) => {
    try {
      const issues: Issue[] = [];
      let temperature: number | null = null;
      if (fields.temperature.trim() !== '') {
        const reading = await readQuantityFully(fields.temperature, 'temperature', '°C');
        if (reading.ok) temperature = reading.value;
        else issues.push({ path: 'temperature', message: reading.message });
      }
      const parsed = Conditions.safeParse({ temperature, humidity: fields.humidity, fixture: fields.fixture });
      issues.push(...(parsed.error?.issues ?? []).map(({ path, message }) => ({ path: path.join('.'), message })));
      if (!parsed.success || issues.length > 0) throw new RequestError(422, 'invalid', 'Not complete.', { issues });
      await record.mutateAsync(parsed.data);
      form.reset(fields);
      tell.done('Conditions stated');
    } catch (error) {
      applyIssues(form, error);
    }
  });
  return (
    <Form onSubmit={() => void submit()} label="Conditions" className="max-sm:[&_.field-box]:min-h-12">
      <FormError message={form.formState.errors.root?.message} />
      <div className="grid grid-cols-2 items-start gap-3">
        <FormField control={form.control} name="temperature">
          {(bind) => (
            <QuantityField label="Temperature" dimension="temperature" unit="°C" least={-100} most={300} {...bind} />
          )}
        </FormField>
        <FormField control={form.control} name="humidity">
          {(bind) => <NumberField label="Humidity" unit="%" least={0} most={100} {...bind} />}
        </FormField>
      </div>
      <FormField control={form.control} name="fixture">
        {(bind) => <TextField label="Fixture" hint="Shaker, mounting, orientation, added masses." {...bind} />}
      </FormField>
      <Button type="submit" pending={record.isPending} className="max-sm:min-h-12 sm:self-start">
        State the conditions
      </Button>
    </Form>
  );
}
