/**
 * The design tokens, once. Colours stand for roles, not hues, and each is a CSS variable of
 * app/globals.css that has a light and a dark value; no other colour exists for a component to use.
 */
import type { Config } from 'tailwindcss';

const colours = ['paper', 'sheet', 'wash', 'ink', 'ash', 'edge', 'rule', 'copper', 'patina', 'ochre', 'garnet'] as const;

export default {
  content: ['./app/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(colours.map((name) => [name, `var(--${name})`])),
    },
    fontFamily: {
      sans: 'var(--font-sans), var(--font-sans-extended), system-ui, sans-serif',
      mono: 'var(--font-mono), ui-monospace, monospace',
    },
    extend: {
      fontSize: {
        fine: ['12.5px', '1.45'],
        small: ['13.5px', '1.5'],
        body: ['15px', '1.5'],
        figure: ['19px', '1.35'],
        heading: ['17px', '1.35'],
        title: ['26px', '1.2'],
        display: ['38px', '1.12'],
      },
      maxWidth: { page: '72rem', measure: '62ch' },
      /** A field, a button and a table row share one height. */
      height: { row: '36px' },
      minHeight: { row: '36px' },
      borderRadius: { field: '3px' },
      zIndex: { header: '10' },
    },
  },
} satisfies Config;
