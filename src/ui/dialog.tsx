import { X } from 'lucide-react';
import type { ReactNode } from 'react';
import { Dialog as AriaDialog } from 'react-aria-components/Dialog';
import { Heading } from 'react-aria-components/Heading';
import { Modal, ModalOverlay } from 'react-aria-components/Modal';
import { IconButton } from './button';
import { classNames } from './class-names';

export interface DialogProps {
  title: string;
  isOpen: boolean;
  onClose: () => void;
  children: ReactNode;
  /** Buttons, the one that does it last. */
  footer?: ReactNode;
  width?: 'narrow' | 'medium' | 'wide';
  /** Asks something that must be answered: not closed by a click beside it. */
  role?: 'dialog' | 'alertdialog';
}

const widths = { narrow: 'max-w-md', medium: 'max-w-2xl', wide: 'max-w-5xl' };

/** The one dialog: focus stays inside, Escape closes it, and focus returns to where it came from. */
export function Dialog({ title, isOpen, onClose, children, footer, width = 'narrow', role = 'dialog' }: DialogProps) {
  return (
    <ModalOverlay
      isOpen={isOpen}
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      isDismissable={role === 'dialog'}
      className="fixed inset-0 z-40 flex items-end justify-center bg-(--shade) sm:items-start sm:p-6 sm:pt-[10vh]"
    >
      <Modal
        className={classNames(
          'w-full animate-[appear_0.12s_ease-out] rounded-t-lg border border-rule bg-paper shadow-(--lift) sm:rounded-lg',
          widths[width],
        )}
      >
        <AriaDialog
          role={role}
          // What lies behind is hidden from assistive technology; this says so to those who only look at the dialog.
          render={(props) => <section {...props} aria-modal />}
          className="flex max-h-[88dvh] flex-col outline-none sm:max-h-[80vh]"
        >
          <div className="flex items-start justify-between gap-4 border-b border-rule px-5 py-3.5">
            <Heading slot="title" level={2} className="pt-1">
              {title}
            </Heading>
            <IconButton icon={X} label="Close" size="small" onPress={onClose} className="-mr-1.5" />
          </div>
          <div className="scroll-pb-14 overflow-y-auto px-5 py-4">{children}</div>
          {footer ? (
            <div className="flex flex-wrap justify-end gap-2.5 border-t border-rule px-5 py-3.5">{footer}</div>
          ) : null}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  );
}
