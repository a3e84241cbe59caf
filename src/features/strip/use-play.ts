import { useCallback, useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { sampleAt, slowdownOf } from './motion';
import type { Motion } from './motion';

const query = '(prefers-reduced-motion: reduce)';
const subscribe = (changed: () => void) => {
  const list = window.matchMedia?.(query);
  list?.addEventListener('change', changed);
  return () => list?.removeEventListener('change', changed);
};
const prefersReduced = () => window.matchMedia?.(query)?.matches ?? false;

export const useReducedMotion = (): boolean => useSyncExternalStore(subscribe, prefersReduced, () => false);

export interface Play {
  /** The motion moves by itself, or in steps where movement is not wanted. */
  mode: 'moving' | 'steps';
  playing: boolean;
  /** s into the motion; null where the assembly rests. */
  time: number | null;
  slowdown: number;
  displacement: number;
  emf: number;
  toggle: () => void;
  reset: () => void;
}

const stepsPerCycle = 16;

/** Runs through the estimated motion, slowed down; in steps for those who asked for less movement. */
export function usePlay(motion: Motion | null, frequency: number | null): Play {
  const reduced = useReducedMotion();
  const [playing, setPlaying] = useState(false);
  const [time, setTime] = useState<number | null>(null);
  const slowdown = motion ? slowdownOf(motion, frequency) : 1;
  const moving = playing && motion !== null && !reduced;
  const last = useRef<number | null>(null);

  useEffect(() => {
    if (!moving) return;
    let frame = 0;
    const tick = (now: number) => {
      const passed = last.current === null ? 0 : Math.min(100, now - last.current);
      last.current = now;
      setTime((before) => (before ?? 0) + passed / 1000 / slowdown);
      frame = requestAnimationFrame(tick);
    };
    frame = requestAnimationFrame(tick);
    return () => {
      cancelAnimationFrame(frame);
      last.current = null;
    };
  }, [moving, slowdown]);

  const cycle = motion ? (motion.periodic || !frequency ? motion.duration : 1 / frequency) : 0;
  const toggle = useCallback(() => {
    if (reduced) setTime((before) => (before === null ? 0 : before + cycle / stepsPerCycle));
    else setPlaying((before) => !before);
  }, [reduced, cycle]);
  const reset = useCallback(() => {
    setPlaying(false);
    setTime(null);
  }, []);
  const shown = motion === null ? null : time;
  return {
    mode: reduced ? 'steps' : 'moving',
    playing: moving,
    time: shown,
    slowdown,
    displacement: motion && shown !== null ? sampleAt(motion, motion.displacement, shown) : 0,
    emf: motion && shown !== null ? sampleAt(motion, motion.emf, shown) : 0,
    toggle,
    reset,
  };
}
