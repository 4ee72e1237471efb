import localFont from 'next/font/local';

/*
 * Alegreya for text and numerals, Alegreya Sans for controls and tables, Alegreya Sans SC for small capitals, all from
 * their npm packages (OFL, see NOTICE). They hold ° ø + but not ♭ ♯ ♮ nor the double signs: those are our own drawings,
 * two kilobytes (lib/theory/sign-outlines.ts, made into a font by lib/cli/draw-signs.ts).
 */
export const book = localFont({
  src: [
    { path: '../node_modules/@fontsource/alegreya/files/alegreya-latin-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../node_modules/@fontsource/alegreya/files/alegreya-latin-400-italic.woff2', weight: '400', style: 'italic' },
    { path: '../node_modules/@fontsource/alegreya/files/alegreya-latin-500-normal.woff2', weight: '500', style: 'normal' },
  ],
  variable: '--font-alegreya',
  display: 'swap',
  adjustFontFallback: 'Times New Roman',
});

export const bookExtended = localFont({
  src: [
    { path: '../node_modules/@fontsource/alegreya/files/alegreya-latin-ext-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../node_modules/@fontsource/alegreya/files/alegreya-latin-ext-500-normal.woff2', weight: '500', style: 'normal' },
  ],
  variable: '--font-alegreya-extended',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0100-02AF,U+1E00-1EFF,U+2020,U+20A0-20AB' }],
});

export const sans = localFont({
  src: [
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-400-italic.woff2', weight: '400', style: 'italic' },
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-500-normal.woff2', weight: '500', style: 'normal' },
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-700-normal.woff2', weight: '700', style: 'normal' },
  ],
  variable: '--font-alegreya-sans',
  display: 'swap',
  adjustFontFallback: 'Arial',
});

export const sansExtended = localFont({
  src: [
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-ext-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../node_modules/@fontsource/alegreya-sans/files/alegreya-sans-latin-ext-500-normal.woff2', weight: '500', style: 'normal' },
  ],
  variable: '--font-alegreya-sans-extended',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0100-02AF,U+1E00-1EFF,U+2020,U+20A0-20AB' }],
});

export const caps = localFont({
  src: [
    { path: '../node_modules/@fontsource/alegreya-sans-sc/files/alegreya-sans-sc-latin-500-normal.woff2', weight: '500', style: 'normal' },
  ],
  variable: '--font-alegreya-sans-sc',
  display: 'swap',
  adjustFontFallback: 'Arial',
});

export const signs = localFont({
  src: [{ path: './fonts/understave-signs.otf', weight: '400', style: 'normal' }],
  variable: '--font-signs',
  display: 'swap',
  adjustFontFallback: false,
  declarations: [{ prop: 'unicode-range', value: 'U+266D-266F,U+1D12A-1D12B' }],
});

/** Class names that put every font variable on the root element. */
export const fontVariables = [book, bookExtended, sans, sansExtended, caps, signs].map((font) => font.variable).join(' ');
