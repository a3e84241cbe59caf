import { useCallback, useEffect, useRef, useState } from 'react';

/** Where the text of an unsaved brief is kept on this device: `new`, or the brief's id. */
const keyOf = (name: string) => `tremolode.brief-draft.${name}`;

interface Kept<T> {
  at: string;
  /** Version of the brief that the text was written on; null for a new one. */
  version: number | null;
  values: T;
  /** What the text was written on, to tell the own changes from somebody else's. */
  from: T;
}

function read<T>(name: string): Kept<T> | null {
  try {
    const text = window.localStorage.getItem(keyOf(name));
    const found: unknown = text === null ? null : JSON.parse(text);
    return found !== null && typeof found === 'object' && 'values' in found && 'from' in found && 'at' in found
      ? (found as Kept<T>)
      : null;
  } catch {
    return null;
  }
}

export interface KeptDraft<T> {
  /** What was found when the page opened. */
  found: Kept<T> | null;
  /** `version` is the one that the text is written on; null for a new brief. */
  keep: (values: T, from: T, version: number | null) => void;
  forget: () => void;
}

/** Keeps the text of a form on this device while it is written, so that a closed tab or a crash loses nothing. */
export function useKeptDraft<T>(name: string): KeptDraft<T> {
  const [found] = useState(() => read<T>(name));
  const waiting = useRef<{ timer: ReturnType<typeof setTimeout>; write: () => void } | null>(null);
  const settle = useCallback((write: boolean) => {
    if (waiting.current === null) return;
    clearTimeout(waiting.current.timer);
    if (write) waiting.current.write();
    waiting.current = null;
  }, []);
  // Leaving the page within the pause must not lose its last words.
  useEffect(() => () => settle(true), [settle]);
  const keep = useCallback(
    (values: T, from: T, version: number | null) => {
      settle(false);
      const write = () => {
        const kept: Kept<T> = { at: new Date().toISOString(), version, values, from };
        try {
          window.localStorage.setItem(keyOf(name), JSON.stringify(kept));
        } catch {
          // Not kept where storage is full or forbidden; the page itself still holds the text.
        }
      };
      waiting.current = { timer: setTimeout(write, 300), write };
    },
    [name, settle],
  );
  const forget = useCallback(() => {
    settle(false);
    try {
      window.localStorage.removeItem(keyOf(name));
    } catch {
      // Nothing was kept either.
    }
  }, [name, settle]);
  return { found, keep, forget };
}
