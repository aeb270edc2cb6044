type Numbers = readonly number[];

/** A stated region as a person would write it: circles or corners line by line, a MOC as it is; '' for what has no text. */
export function footprintText(value: unknown): string {
  if (typeof value === 'string') return value;
  if (!Array.isArray(value)) return '';
  const shapes = value as readonly (Numbers | readonly Numbers[])[];
  const line = (numbers: Numbers) => numbers.join(' ');
  return shapes
    .map((shape) => (typeof shape[0] === 'number' ? line(shape as Numbers) : (shape as Numbers[]).map(line).join('\n')))
    .join(typeof shapes[0]?.[0] === 'number' ? '\n' : '\n\n');
}
