import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Revision } from '#contracts/revisions';
import { DraftSaver, keepInBrowser } from '../../../src/features/design/draft-saver';
import type { Kept } from '../../../src/features/design/draft-saver';
import type { Draft } from '../../../src/features/design/document-path';
import { RequestError } from '../../../src/lib/request-error';

const at = '2026-03-14T09:00:00.000Z';
const revisionOf = (version: number, document: Draft) => ({ version, document, updatedAt: at }) as Revision;

function setUp(options: { kept?: Kept; save?: (version: number, document: Draft) => Promise<Revision> } = {}) {
  let kept: Kept | null = options.kept ?? null;
  const save = vi.fn(
    options.save ?? ((version: number, document: Draft) => Promise.resolve(revisionOf(version + 1, document))),
  );
  const saver = new DraftSaver({
    revision: revisionOf(3, { turns: '1000' }),
    save,
    keep: { read: () => kept, write: (next) => (kept = next), clear: () => (kept = null) },
    now: () => new Date(at),
  });
  saver.start();
  return { saver, save, kept: () => kept };
}

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

describe('DraftSaver', () => {
  it('sends once, a second after the last change, and keeps the draft in the browser until then', async () => {
    const { saver, save, kept } = setUp();
    saver.edit({ turns: '1' });
    await vi.advanceTimersByTimeAsync(900);
    saver.edit({ turns: '12' });
    expect(saver.read().state.kind).toBe('waiting');
    expect(kept()).toMatchObject({ version: 3, document: { turns: '12' } });
    await vi.advanceTimersByTimeAsync(999);
    expect(save).not.toHaveBeenCalled();
    await vi.advanceTimersByTimeAsync(1);
    expect(save.mock.calls).toEqual([[3, { turns: '12' }]]);
    expect(saver.read().state).toEqual({ kind: 'saved', at });
    expect(kept()).toBeNull();
  });

  it('never sends two at a time, and sends what was typed meanwhile with the version just given', async () => {
    let answer: (revision: Revision) => void = () => undefined;
    const { saver, save } = setUp({ save: () => new Promise((resolve) => (answer = resolve)) });
    saver.edit({ turns: '1' });
    await vi.advanceTimersByTimeAsync(1000);
    saver.edit({ turns: '2' });
    await vi.advanceTimersByTimeAsync(5000);
    expect(save).toHaveBeenCalledTimes(1);
    answer(revisionOf(4, { turns: '1' }));
    await vi.advanceTimersByTimeAsync(1000);
    expect(save.mock.calls[1]).toEqual([4, { turns: '2' }]);
    expect(saver.read().draft).toEqual({ turns: '2' });
  });

  it('keeps the draft when the server is away, and tries again, ever more slowly, until it answers', async () => {
    let away = true;
    const { saver, save, kept } = setUp({
      save: (version, document) =>
        away
          ? Promise.reject(new RequestError(0, 'offline', 'No answer.'))
          : Promise.resolve(revisionOf(version + 1, document)),
    });
    saver.edit({ turns: '900' });
    await vi.advanceTimersByTimeAsync(1000);
    expect(saver.read().state.kind).toBe('offline');
    expect(kept()?.document).toEqual({ turns: '900' });
    await vi.advanceTimersByTimeAsync(3000);
    expect(save).toHaveBeenCalledTimes(2);
    await vi.advanceTimersByTimeAsync(5999);
    expect(save).toHaveBeenCalledTimes(2);
    away = false;
    saver.retry();
    await vi.advanceTimersByTimeAsync(0);
    expect(saver.read().state.kind).toBe('saved');
    expect(kept()).toBeNull();
  });

  it('stops at a draft that somebody else changed, until the person chooses', async () => {
    const changed = [{ version: 4, by: 'Oskar Lind', at, what: 'Saved the draft' }];
    let refuse = true;
    const { saver, save } = setUp({
      save: (version, document) =>
        refuse
          ? Promise.reject(new RequestError(409, 'conflict', 'Somebody saved.', { changed }))
          : Promise.resolve(revisionOf(version + 1, document)),
    });
    saver.edit({ turns: '900' });
    await vi.advanceTimersByTimeAsync(1000);
    expect(saver.read().state).toMatchObject({ kind: 'conflict', changed });
    saver.edit({ turns: '901' });
    await vi.advanceTimersByTimeAsync(60_000);
    expect(save).toHaveBeenCalledTimes(1);
    await expect(saver.flush()).rejects.toThrow(/Choose first/);
    refuse = false;
    saver.keep(revisionOf(4, { turns: '1100' }));
    await vi.advanceTimersByTimeAsync(0);
    expect(save.mock.calls[1]).toEqual([4, { turns: '901' }]);
    expect(saver.read().state.kind).toBe('saved');
  });

  it('takes theirs over whole', async () => {
    const { saver, kept } = setUp({ save: () => Promise.reject(new RequestError(409, 'conflict', 'Somebody saved.')) });
    saver.edit({ turns: '900' });
    await vi.advanceTimersByTimeAsync(1000);
    saver.takeTheirs(revisionOf(5, { turns: '1100' }));
    expect(saver.read()).toMatchObject({ draft: { turns: '1100' }, state: { kind: 'saved' } });
    expect(kept()).toBeNull();
  });

  it('flushes what is pending at once, for a step that must not be taken on an older state', async () => {
    const { saver, save } = setUp();
    saver.edit({ turns: '900' });
    await saver.flush();
    expect(save).toHaveBeenCalledTimes(1);
    await saver.flush();
    expect(save).toHaveBeenCalledTimes(1);
  });

  it('restores what had not reached the server, and saves it', async () => {
    const { saver, save } = setUp({ kept: { version: 3, document: { turns: '850' }, at } });
    expect(saver.read()).toMatchObject({ draft: { turns: '850' }, restored: true });
    await vi.advanceTimersByTimeAsync(1000);
    expect(save.mock.calls).toEqual([[3, { turns: '850' }]]);
    expect(saver.read()).toMatchObject({ restored: true, state: { kind: 'saved' } });
    saver.edit({ turns: '851' });
    expect(saver.read().restored).toBe(false);
  });

  it('asks where what was kept belongs to an older version than the server has', async () => {
    const { saver, save } = setUp({ kept: { version: 2, document: { turns: '850' }, at } });
    expect(saver.read().state.kind).toBe('conflict');
    await vi.advanceTimersByTimeAsync(10_000);
    expect(save).not.toHaveBeenCalled();
  });

  it('follows the server where nothing is pending, and leaves one’s own typing alone where something is', () => {
    const { saver } = setUp();
    saver.adopt(revisionOf(4, { turns: '1100' }));
    expect(saver.read().draft).toEqual({ turns: '1100' });
    saver.edit({ turns: '900' });
    saver.adopt(revisionOf(5, { turns: '1200' }));
    expect(saver.read().draft).toEqual({ turns: '900' });
    expect(saver.read().state.kind).toBe('waiting');
  });

  it('does not try again what the server will never take', async () => {
    const { saver, save } = setUp({ save: () => Promise.reject(new RequestError(403, 'forbidden', 'Not yours.')) });
    saver.edit({ turns: '900' });
    await vi.advanceTimersByTimeAsync(60_000);
    expect(save).toHaveBeenCalledTimes(1);
    expect(saver.read().state).toEqual({ kind: 'refused', message: 'Not yours.' });
  });
});

describe('keepInBrowser', () => {
  it('keeps a draft by its revision and survives a spoilt entry', () => {
    const entries = new Map<string, string>();
    const storage = {
      getItem: (key: string) => entries.get(key) ?? null,
      setItem: (key: string, value: string) => entries.set(key, value),
      removeItem: (key: string) => entries.delete(key),
    } as unknown as Storage;
    const keep = keepInBrowser('r1', storage);
    expect(keep.read()).toBeNull();
    keep.write({ version: 2, document: { turns: '1' }, at });
    expect(keep.read()).toEqual({ version: 2, document: { turns: '1' }, at });
    expect(keepInBrowser('r2', storage).read()).toBeNull();
    entries.set('tremolode.draft.r1', '{');
    expect(keep.read()).toBeNull();
    keep.clear();
    expect(entries.size).toBe(0);
    expect(keepInBrowser('r1', null).read()).toBeNull();
  });
});
