/**
 * The look's tokens as Tailwind's theme. The colours themselves are CSS variables in
 * src/styles/tokens.css; nothing outside this list is to be had, so that no other colour, size or
 * radius can slip in. Spacing counts pixels (`p-14` is 14 px): prefer 4, 8, 14, 22 and 44.
 */
import type { Config } from 'tailwindcss';

const colour = (name: string) => `var(--${name})`;
const mineral = (name: string) => ({ DEFAULT: colour(name), wash: colour(`${name}-wash`) });

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    screens: { desk: '900px' },
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      paper: colour('paper'),
      sheet: colour('sheet'),
      ink: { DEFAULT: colour('ink'), 2: colour('ink-2'), 3: colour('ink-3') },
      rule: colour('rule'),
      hair: colour('hair'),
      verdigris: mineral('verdigris'),
      cinnabar: mineral('cinnabar'),
      ochre: mineral('ochre'),
      ultramarine: mineral('ultramarine'),
    },
    fontFamily: {
      serif: ["'Source Serif 4 Variable'", 'Georgia', 'serif'],
      mono: ["'JetBrains Mono'", 'monospace'],
    },
    fontSize: {
      hero: ['clamp(40px, 7vw, 84px)', { lineHeight: '1.02', letterSpacing: '-1.6px' }],
      title: ['34px', { lineHeight: '1.15', letterSpacing: '-0.3px' }],
      heading: ['26px', { lineHeight: '1.2', letterSpacing: '-0.2px' }],
      lede: ['20px', { lineHeight: '1.5' }],
      formula: ['19px', { lineHeight: '1.5' }],
      body: ['17px', { lineHeight: '1.5' }],
      note: ['15px', { lineHeight: '1.45' }],
      label: ['13px', { lineHeight: '1.5' }],
    },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    maxWidth: { content: '1272px', text: '640px', full: '100%', none: 'none' },
    extend: {
      transitionDuration: { DEFAULT: '120ms' },
    },
  },
} satisfies Config;
