/**
 * Tokens of the sheet. Colours are CSS variables (src/styles/tokens.css), so that one class serves light,
 * dark and the system's choice. Spacing keeps the base of 4 px.
 */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    screens: { wide: '861px', beside: '1181px', full: '1430px' },
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: 'var(--paper)',
      sunk: 'var(--sunk)',
      sheet: 'var(--sheet)',
      ink: { DEFAULT: 'var(--ink)', 2: 'var(--ink-2)', 3: 'var(--ink-3)' },
      ref: 'var(--ref)',
      rule: { DEFAULT: 'var(--rule)', strong: 'var(--rule-strong)' },
      margin: 'var(--margin)',
      worse: 'var(--worse)',
      better: 'var(--better)',
      other: 'var(--other)',
      same: 'var(--same)',
    },
    fontFamily: {
      sans: ['var(--sans)'],
      mono: ['var(--mono)'],
    },
    fontSize: {
      verdict: ['26px', { lineHeight: '34px', letterSpacing: '-0.008em' }],
      'verdict-narrow': ['21px', { lineHeight: '28px', letterSpacing: '-0.008em' }],
      lead: ['14.5px', { lineHeight: '21px' }],
      body: ['14px', { lineHeight: '20px' }],
      table: ['13px', { lineHeight: '18px' }],
      figure: ['12.5px', { lineHeight: '18px' }],
      note: ['12.5px', { lineHeight: '17px' }],
      header: ['12px', { lineHeight: '16px' }],
      code: ['11.5px', { lineHeight: '18px' }],
      key: ['11px', { lineHeight: '15px' }],
    },
    borderRadius: { none: '0', focus: '1px', control: '2px' },
  },
};
