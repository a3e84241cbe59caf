import { useEffect, useState } from 'react';

/** Where the text of an unsaved brief is kept on this device: `new`, or the brief's id. */
const keyOf = (name: string) => `tremolode.brief-draft.${name}`;

interface Kept<T> {
  at: string;
  /** Version of the brief that the text was written on; null for a new one. */
  version: number | null;
  values: T;
}

function read<T>(name: string): Kept<T> | null {
  try {
    const text = window.localStorage.getItem(keyOf(name));
    const found: unknown = text === null ? null : JSON.parse(text);
    return found !== null && typeof found === 'object' && 'values' in found && 'at' in found ? (found as Kept<T>) : null;
  } catch {
    return null;
  }
}

export interface KeptDraft<T> {
  /** What was found when the page opened. */
  found: Kept<T> | null;
  keep: (values: T) => void;
  forget: () => void;
}

/** Keeps the text of a form on this device while it is written, so that a closed tab or a crash loses nothing. */
export function useKeptDraft<T>(name: string, version: number | null): KeptDraft<T> {
  const [found] = useState(() => read<T>(name));
  const [timer] = useState<{ id: ReturnType<typeof setTimeout> | undefined }>(() => ({ id: undefined }));
  useEffect(() => () => clearTimeout(timer.id), [timer]);
  const write = (values: T) => {
    try {
      window.localStorage.setItem(keyOf(name), JSON.stringify({ at: new Date().toISOString(), version, values } satisfies Kept<T>));
    } catch {
      // Not kept where storage is full or forbidden; the page itself still holds the text.
    }
  };
  return {
    found,
    keep: (values) => {
      clearTimeout(timer.id);
      timer.id = setTimeout(() => write(values), 300);
    },
    forget: () => {
      clearTimeout(timer.id);
      try {
        window.localStorage.removeItem(keyOf(name));
      } catch {
        // Nothing was kept either.
      }
    },
  };
}
