import { Toaster, toast } from 'sonner';
import { useTheme } from '../lib/theme';

interface TellOptions {
  detail?: string;
  action?: { label: string; onPress: () => void };
}

const show =
  (kind: 'success' | 'error' | 'info', duration: number) =>
  (message: string, options: TellOptions = {}) => {
    toast[kind](message, {
      duration,
      description: options.detail,
      ...(options.action ? { action: { label: options.action.label, onClick: options.action.onPress } } : {}),
    });
  };

/** Short words about something done, at the edge of the page. Errors that need an answer belong where they happened. */
export const tell = {
  done: show('success', 4000),
  note: show('info', 5000),
  failed: show('error', 10_000),
};

const tones = '!border-l-4';

export function Toasts() {
  const { theme } = useTheme();
  return (
    <Toaster
      theme={theme}
      position="bottom-right"
      closeButton
      containerAriaLabel="Messages"
      toastOptions={{
        classNames: {
          toast: '!bg-sheet !text-ink !border-rule !font-sans !rounded-md !shadow-(--lift) !text-[1rem]',
          description: '!text-graphite',
          success: `${tones} !border-l-verdigris`,
          error: `${tones} !border-l-cinnabar`,
          info: `${tones} !border-l-graphite`,
          actionButton: '!bg-copper !text-on-copper',
          closeButton: '!bg-sheet !text-ink !border-rule',
        },
      }}
    />
  );
}
