/** Colours and faces of a picture: any CSS value, so that a screen may give its variables and paper gets plain colours. */
export interface DrawingTheme {
  field: string;
  text: string;
  muted: string;
  line: string;
  lineStrong: string;
  hatch: string;
  amber: string;
  concordant: string;
  other: string;
  none: string;
  ultraviolet: string;
  serious: string;
  zoneCounterpart: string;
  zoneNeighbour: string;
  zoneDebris: string;
  /** Face of numbers and names. */
  mono: string;
  /** Face of words. */
  prose: string;
}

/** For paper and for files: colours of the light theme without transparency, told apart by the colour-blind too. */
export const PAPER: DrawingTheme = {
  field: '#ffffff',
  text: '#1d232c',
  muted: '#575f6b',
  line: '#dcd5c5',
  lineStrong: '#b8ae98',
  hatch: '#cfc6b2',
  amber: '#8f5800',
  concordant: '#00679f',
  other: '#a8401c',
  none: '#5b6572',
  ultraviolet: '#6a45b8',
  serious: '#a93412',
  zoneCounterpart: '#f5ecdc',
  zoneNeighbour: '#eef5f9',
  zoneDebris: '#f7e6df',
  mono: "'Roboto Mono', monospace",
  prose: "'Source Sans 3', 'Source Sans 3 Variable', sans-serif",
};

/** The same names as variables of the application's style sheet: follows its theme. */
export const SCREEN: DrawingTheme = {
  field: 'var(--field)',
  text: 'var(--text)',
  muted: 'var(--muted)',
  line: 'var(--line)',
  lineStrong: 'var(--line-strong)',
  hatch: 'var(--hatch)',
  amber: 'var(--amber)',
  concordant: 'var(--concordant)',
  other: 'var(--other-velocity)',
  none: 'var(--no-velocity)',
  ultraviolet: 'var(--ultraviolet)',
  serious: 'var(--serious)',
  zoneCounterpart: 'var(--zone-counterpart)',
  zoneNeighbour: 'var(--zone-neighbour)',
  zoneDebris: 'var(--zone-debris)',
  mono: 'var(--mono)',
  prose: 'var(--prose)',
};
