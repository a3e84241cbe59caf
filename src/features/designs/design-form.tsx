import { useForm } from 'react-hook-form';
import type { BriefSummary } from '#contracts/briefs';
import { formatQuantity } from '../../lib/quantities';
import { Button } from '../../ui/button';
import { ComboBox } from '../../ui/combo-box';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { TextField } from '../../ui/text-field';

interface NewDesign {
  title: string;
  briefId: string;
}

interface DesignFormProps {
  briefs: readonly BriefSummary[];
  briefId: string;
  title: string;
  /** What the design starts from, in words. */
  start: string;
  onCreate: (design: NewDesign) => Promise<void>;
}

/** Title and brief are all it takes: the rest is typed in the draft. */
export function DesignForm({ briefs, briefId, title, start, onCreate }: DesignFormProps) {
  const form = useForm<NewDesign>({ defaultValues: { title, briefId } });
  const submit = form.handleSubmit(async (values) => {
    let complete = true;
    if (values.title.trim() === '') {
      form.setError(
        'title',
        { message: 'Title: say what it is for, e.g. “Pump-side node, 49 Hz”.' },
        { shouldFocus: true },
      );
      complete = false;
    }
    if (values.briefId === '') {
      form.setError(
        'briefId',
        { message: 'Brief: choose the one that this design answers.' },
        { shouldFocus: complete },
      );
      complete = false;
    }
    if (!complete) return;
    try {
      await onCreate({ title: values.title.trim(), briefId: values.briefId });
    } catch (error) {
      applyIssues(form, error);
    }
  });
  const choices = briefs.map((brief) => ({
    value: brief.id,
    label: `${brief.number} ${brief.title}`,
    detail: `${formatQuantity(brief.powerNeeded, 'power')} from ${brief.vibrationInWords}`,
  }));
  return (
    <Form onSubmit={() => void submit()} label="Start a design" className="max-w-xl">
      <FormError message={form.formState.errors.root?.message} />
      <FormField control={form.control} name="briefId">
        {(bind) => (
          <ComboBox
            label="Brief"
            required
            choices={choices}
            placeholder="Find a brief by number or title"
            hint={chosenWords(briefs, bind.value)}
            {...bind}
          />
        )}
      </FormField>
      <FormField control={form.control} name="title">
        {(bind) => (
          <TextField
            label="Title"
            required
            maxLength={200}
            hint="The machine and where the generator sits, as people will say it."
            {...bind}
          />
        )}
      </FormField>
      <p className="text-graphite">{start}</p>
      <div>
        <Button type="submit" variant="primary" pending={form.formState.isSubmitting}>
          Start the design
        </Button>
      </div>
    </Form>
  );
}

function chosenWords(briefs: readonly BriefSummary[], briefId: string): string | undefined {
  const brief = briefs.find(({ id }) => id === briefId);
  return (
    brief &&
    `${brief.machine === '' ? '' : `${brief.machine}: `}${formatQuantity(brief.powerNeeded, 'power')} from ${brief.vibrationInWords}.`
  );
}
