import { Toaster } from 'sonner';
import { useTheme } from '../lib/theme';

const tones = '!border-l-4';

export default function ToastRegion() {
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
