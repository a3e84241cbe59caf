import type { Config } from 'tailwindcss';

/** Colours are CSS variables (src/app/styles.css) so that one class name serves both themes. */
const token = (name: string) => `var(--${name})`;

export default {
  content: [],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    extend: {
      colors: {
        paper: token('paper'),
        sheet: token('sheet'),
        ink: token('ink'),
        graphite: token('graphite'),
        rule: token('rule'),
        wash: token('wash'),
        copper: token('copper'),
        'on-copper': token('on-copper'),
        verdigris: token('verdigris'),
        amber: token('amber'),
        cinnabar: token('cinnabar'),
        north: token('north'),
        south: token('south'),
      },
      fontFamily: {
        sans: ['"Atkinson Hyperlegible Next Variable"', 'system-ui', 'sans-serif'],
        mono: ['"Atkinson Hyperlegible Mono Variable"', 'ui-monospace', 'monospace'],
      },
    },
  },
} satisfies Config;
