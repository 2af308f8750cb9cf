/** Names for the tokens of src/styles/tokens.css, so that a utility class and a hand-written rule mean the same colour. */
const token = (name) => `var(--${name})`;

const colours = [
  'ink',
  'soft',
  'paper',
  'board',
  'line',
  'plum',
  'plum-tint',
  'mint',
  'mint-tint',
  'saffron',
  'saffron-tint',
  'brick',
  'brick-tint',
  'fold',
];

/** @type {import('tailwindcss').Config} */
export default {
  content: ['./src/**/*.{astro,ts,tsx,mdx}', './content/**/*.mdx'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      ...Object.fromEntries(colours.map((name) => [name, token(name)])),
    },
    fontFamily: { sans: ['Figtree', 'system-ui', 'sans-serif'] },
    fontWeight: { normal: '400', medium: '500', semibold: '600', bold: '600', extrabold: '800' },
    fontSize: {
      sm: ['0.875rem', '1.25rem'],
      base: ['1rem', '1.5rem'],
      lg: ['1.125rem', '1.75rem'],
      xl: ['1.375rem', '1.75rem'],
      '2xl': ['1.75rem', '2rem'],
      '3xl': ['2.25rem', '2.5rem'],
      '4xl': ['3rem', '3.25rem'],
    },
    screens: { sm: '480px', md: '720px', lg: '1000px', xl: '1320px' },
    extend: {
      maxWidth: { page: '77.5rem', text: '66ch' },
      minHeight: { touch: '2.75rem' },
      minWidth: { touch: '2.75rem' },
    },
  },
  // Tokens are CSS variables already mixed for each theme, so no utility needs an opacity of its own.
  corePlugins: { backgroundOpacity: false, textOpacity: false, borderOpacity: false, divideOpacity: false },
};
