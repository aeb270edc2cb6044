/** Things that could fake a dark detection, by their names. */
export const DOUBT_NAMES = [
  'spurious line',
  'cloud',
  'debris',
  'hydroxyl',
  'recombination line',
  'interference',
  'blend',
  'sidelobe',
  'continuum',
  'extinction',
  'edge',
  'distance',
] as const;
export type DoubtName = (typeof DOUBT_NAMES)[number];

/** From best to worst; `not testable here` means that nothing can be said, which is never good news. */
export const DOUBT_GRADES = ['clear', 'not testable here', 'watch', 'serious'] as const;
export type DoubtGrade = (typeof DOUBT_GRADES)[number];

/** One doubt about one detection. */
export interface Doubt {
  name: DoubtName;
  grade: DoubtGrade;
  /** The number that decided, where there is one; always finite. */
  value?: number;
  unit?: string;
  /** Plain sentence with numbers and units. */
  sentence: string;
  /** The rule applied, with its thresholds. */
  rule: string;
  source: string;
}

/** Parts of a doubt that do not depend on the detection. */
export type DoubtRule = Pick<Doubt, 'name' | 'rule' | 'source'>;

/**
 * Puts a doubt together; a value that is missing or not finite is left out, so none reaches a screen.
 *
 * @param rule name, rule and source
 * @param grade outcome
 * @param sentence plain sentence
 * @param value deciding number, NaN where there is none
 * @param unit unit of the number
 */
export function doubt(rule: DoubtRule, grade: DoubtGrade, sentence: string, value = NaN, unit?: string): Doubt {
  const result: Doubt = { name: rule.name, rule: rule.rule, source: rule.source, grade, sentence };
  if (Number.isFinite(value)) {
    result.value = value;
    if (unit !== undefined) result.unit = unit;
  }
  return result;
}

/** The worst grade of several doubts; `clear` of none. */
export function worstGrade(doubts: readonly Doubt[]): DoubtGrade {
  const worst = Math.max(0, ...doubts.map(({ grade }) => DOUBT_GRADES.indexOf(grade)));
  return DOUBT_GRADES[worst]!;
}

/** As {@link inWords} with two digits: for what rests on a distance or a model. */
export const roughly = (value: number): string => inWords(Number(value.toPrecision(2)));

/** A number for a sentence: three significant digits, no exponent below a million. */
export function inWords(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e6 || size < 1e-4) return value.toExponential(1);
  return size >= 100 ? value.toFixed(0) : String(Number(value.toPrecision(3)));
}
