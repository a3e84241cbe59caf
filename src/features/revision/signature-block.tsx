import type { Control } from 'react-hook-form';
import { FormField } from '../../ui/form';
import { PasswordField } from '../../ui/text-field';
import { Digest } from './digest';
import type { EventFields } from './event-forms';
import { useSignerName } from './signer';

interface SignatureBlockProps {
  meaning: string;
  digest: string;
  /** What is signed, e.g. “FN-014 B”. */
  name: string;
  control: Control<EventFields>;
}

/** What is signed, in which words, by whom, and the password that signs it. */
export function SignatureBlock({ meaning, digest, name, control }: SignatureBlockProps) {
  const signer = useSignerName();
  return (
    <section aria-label="Signature" className="flex flex-col gap-3 border-t border-rule pt-4">
      <blockquote className="border-l-[3px] border-copper bg-wash px-3.5 py-2.5">
        <p className="font-medium">“{meaning}”</p>
        <footer className="mt-1 text-graphite">
          {signer === null ? 'Signed under your name' : `Signed as ${signer}`}, with the time of the server, for {name}{' '}
          as it stands now:
        </footer>
        <Digest value={digest} className="mt-1 block" />
      </blockquote>
      <FormField control={control} name="password">
        {(bind) => (
          <PasswordField
            label="Your password"
            hint="Entered again because this is a signature."
            autoComplete="current-password"
            required
            {...bind}
          />
        )}
      </FormField>
    </section>
  );
}
