import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;
const tokens = (...names: string[]) => Object.fromEntries(names.map((name) => [name, token(name)]));

/** Names for the tokens of src/index.css; no other colour can be written, so every screen has both themes. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      ...tokens('paper', 'surface', 'line', 'edge', 'ink', 'muted', 'veil'),
      ...tokens('ember', 'on-ember', 'petrol', 'on-petrol', 'moss', 'amber', 'crimson', 'on-crimson'),
      ...tokens('ember-soft', 'petrol-soft', 'moss-soft', 'amber-soft', 'crimson-soft'),
    },
    fontFamily: { sans: ['Manrope', 'ui-sans-serif', 'system-ui', 'sans-serif'] },
    borderRadius: { none: '0', sm: '3px', DEFAULT: '6px', lg: '10px', full: '9999px' },
    boxShadow: { none: 'none', float: token('shadow-float') },
    extend: {
      spacing: { control: token('control'), 'control-small': token('control-small') },
    },
  },
} satisfies Config;
