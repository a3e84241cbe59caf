import { useSyncExternalStore } from 'react';

export type ThemeChoice = 'light' | 'dark' | 'system';
export type Theme = 'light' | 'dark';

/** The same key and colours as public/theme.js, which sets the theme before the first paint. */
const key = 'tremolode.theme';
const paper: Record<Theme, string> = { light: '#f7f4ee', dark: '#14171a' };

const listeners = new Set<() => void>();
const system = () => window.matchMedia('(prefers-color-scheme: dark)');

function readChoice(): ThemeChoice {
  try {
    const stored = window.localStorage.getItem(key);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
}

let choice: ThemeChoice | null = null;
const currentChoice = (): ThemeChoice => (choice ??= readChoice());
const currentTheme = (): Theme => {
  const chosen = currentChoice();
  return chosen === 'system' ? (system().matches ? 'dark' : 'light') : chosen;
};

function apply(): void {
  const theme = currentTheme();
  document.documentElement.dataset.theme = theme;
  document.querySelector('meta[name="theme-color"]')?.setAttribute('content', paper[theme]);
  for (const listener of listeners) listener();
}

/** Sets and remembers the theme on this device. */
export function chooseTheme(next: ThemeChoice): void {
  choice = next;
  try {
    if (next === 'system') window.localStorage.removeItem(key);
    else window.localStorage.setItem(key, next);
  } catch {
    // Not remembered where storage is forbidden; it still holds until the page is left.
  }
  apply();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  const query = system();
  const onStorage = (event: StorageEvent) => {
    if (event.key !== key) return;
    choice = readChoice();
    apply();
  };
  query.addEventListener('change', apply);
  window.addEventListener('storage', onStorage);
  return () => {
    listeners.delete(listener);
    query.removeEventListener('change', apply);
    window.removeEventListener('storage', onStorage);
  };
}

/** What was chosen and what it comes to. */
export function useTheme(): { choice: ThemeChoice; theme: Theme } {
  const chosen = useSyncExternalStore(subscribe, currentChoice);
  const theme = useSyncExternalStore(subscribe, currentTheme);
  return { choice: chosen, theme };
}
