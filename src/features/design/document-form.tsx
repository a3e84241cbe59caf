import { createContext, useContext } from 'react';
import type { CatalogueEntry } from '#contracts/catalogue';
import type { Draft } from './document-path';
import { insertAt, readAt, removeAt, writeAt } from './document-path';
import type { DesignHints } from './hints';

/** What the fields of a design document need to know. */
export interface DocumentFormValue {
  document: Draft;
  readOnly: boolean;
  catalogue: readonly CatalogueEntry[];
  hints: DesignHints;
  /** What the server found wrong at a path, as long as the value there is still the one it saw. */
  issueAt: (path: string) => string | undefined;
  change: (document: Draft) => void;
  /** Parts put aside when another kind was chosen, so that choosing back brings them back. */
  shelf: Map<string, unknown>;
  /** Starts a remark on a value; absent where none can be made. */
  onRemark?: ((path: string) => void) | undefined;
}

const DocumentFormContext = createContext<DocumentFormValue | null>(null);

export const DocumentForm = DocumentFormContext.Provider;

export function useDocumentForm() {
  const form = useContext(DocumentFormContext);
  if (!form) throw new Error('A field of a design document stands outside its form.');
  const { document, change } = form;
  return {
    ...form,
    valueAt: (path: string): unknown => readAt(document, path),
    setAt: (path: string, value: unknown) => change(writeAt(document, path, value)),
    addTo: (path: string, value: unknown) => change(insertAt(document, path, value)),
    removeFrom: (path: string, index: number) => change(removeAt(document, path, index)),
  };
}
