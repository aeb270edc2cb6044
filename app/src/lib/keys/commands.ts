/** One command of the detection page that has a key. */
export interface KeyedCommand {
  readonly id: CommandId;
  readonly label: string;
  readonly group: 'Decide' | 'Evidence' | 'Move';
  /** As Blueprint writes it; a second key of the same command is never remapped. */
  readonly combo: string;
  readonly also?: string;
}

export const COMMAND_IDS = [
  'agree',
  'override',
  'agreeWithNote',
  'noGalaxy',
  'askSpectrum',
  'settle',
  'shortlist',
  'acceptCandidate',
  'rejectCandidate',
  'doubt',
  'ask',
  'undo',
  'nextCandidate',
  'previousCandidate',
  'tabCandidates',
  'tabNeighbours',
  'tabLimits',
  'tabStability',
  'tabHistory',
  'previous',
  'next',
  'list',
] as const;
export type CommandId = (typeof COMMAND_IDS)[number];

/** Every key of the detection page, in the order of the help sheet; buttons, keys, help and settings read this one list. */
export const COMMANDS: readonly KeyedCommand[] = [
  { id: 'agree', label: 'agree', group: 'Decide', combo: 'enter' },
  { id: 'override', label: 'override…', group: 'Decide', combo: 'o' },
  { id: 'agreeWithNote', label: 'agree with a note…', group: 'Decide', combo: 'n' },
  { id: 'noGalaxy', label: 'not a real or galactic line…', group: 'Decide', combo: 'r' },
  { id: 'askSpectrum', label: 'ask for an HI spectrum…', group: 'Decide', combo: 'w' },
  { id: 'settle', label: 'settle…', group: 'Decide', combo: 's' },
  { id: 'shortlist', label: 'shortlist', group: 'Decide', combo: 'l' },
  { id: 'undo', label: 'undo my last decision', group: 'Decide', combo: 'z' },
  { id: 'nextCandidate', label: 'choose the next object', group: 'Evidence', combo: '.' },
  { id: 'previousCandidate', label: 'choose the object before', group: 'Evidence', combo: ',' },
  { id: 'acceptCandidate', label: 'make the chosen object the counterpart…', group: 'Evidence', combo: 'c' },
  { id: 'rejectCandidate', label: 'reject the chosen object…', group: 'Evidence', combo: 'x' },
  { id: 'doubt', label: 'clear or confirm a doubt…', group: 'Evidence', combo: 'd' },
  { id: 'ask', label: 'remark, or ask a colleague…', group: 'Evidence', combo: 'q' },
  { id: 'tabCandidates', label: 'show the candidates', group: 'Evidence', combo: '1' },
  { id: 'tabNeighbours', label: 'show the neighbours', group: 'Evidence', combo: '2' },
  { id: 'tabLimits', label: 'show the limits', group: 'Evidence', combo: '3' },
  { id: 'tabStability', label: 'show the stability', group: 'Evidence', combo: '4' },
  { id: 'tabHistory', label: 'show the history', group: 'Evidence', combo: '5' },
  { id: 'previous', label: 'previous', group: 'Move', combo: 'k', also: 'arrowleft' },
  { id: 'next', label: 'next', group: 'Move', combo: 'j', also: 'arrowright' },
  { id: 'list', label: 'up to the list', group: 'Move', combo: 'u' },
];

/** Keys as one person set them; commands without an entry keep their own. */
export type KeyMap = Partial<Record<CommandId, string>>;

export const comboOf = (id: CommandId, keys: KeyMap): string =>
  keys[id] ?? COMMANDS.find((command) => command.id === id)!.combo;

/** Keys that mean something already: the help sheet, the sky panel, moving in the page, closing a dialog. */
const TAKEN = new Set(['shift+?', '?', '[', ']', 'm', 'tab', 'shift+tab', 'escape', 'space', 'arrowup', 'arrowdown']);

/**
 * Why a key cannot be given to a command; undefined where it can.
 *
 * @param combo as Blueprint writes it
 */
export function keyFault(id: CommandId, combo: string, keys: KeyMap): string | undefined {
  if (combo === '') return 'Press a key.';
  if (/^(shift|ctrl|alt|meta)$/.test(combo.split('+').at(-1)!)) return 'Press another key together with it.';
  if (TAKEN.has(combo)) return 'This key has a meaning of its own in the page.';
  if (/(ctrl|meta|alt)\+/.test(combo)) return 'Keys with Control, Alt or Command belong to the browser.';
  const other = COMMANDS.find(
    (command) => command.id !== id && (comboOf(command.id, keys) === combo || command.also === combo),
  );
  return other && `It is the key of “${other.label}”.`;
}

const NAMES: Record<string, string> = { enter: 'Enter', arrowleft: '←', arrowright: '→', space: 'Space' };

/** How a key is written on a button. */
export const keyName = (combo: string): string =>
  combo
    .split('+')
    .map((part) => NAMES[part] ?? (part.length === 1 ? part.toUpperCase() : part[0]!.toUpperCase() + part.slice(1)))
    .join(' ');
