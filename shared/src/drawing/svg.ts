/** Attributes of an element; what is undefined is left out. */
export type Attributes = Record<string, string | number | undefined>;

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

/** Characters that XML 1.0 does not allow at all, escaped or not: controls, two non-characters, half of a pair. */
const FORBIDDEN =
  /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g;

/** Text as it may stand in an element or an attribute. Names come from uploaded tables: nothing of them is trusted. */
export const escapeXml = (text: string): string =>
  text.replace(FORBIDDEN, '').replace(/[&<>"']/g, (sign) => ENTITIES[sign]!);

/** A coordinate to a hundredth of a pixel, without trailing zeros. */
export const px = (value: number): string => String(Math.round(value * 100) / 100);

/** One element with its attributes escaped; children are SVG already. */
export function element(name: string, attributes: Attributes, ...children: string[]): string {
  const given = Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => ` ${key}="${typeof value === 'number' ? px(value) : escapeXml(value!)}"`)
    .join('');
  const inside = children.join('');
  return inside === '' ? `<${name}${given}/>` : `<${name}${given}>${inside}</${name}>`;
}

/** A line of text. */
export const textAt = (x: number, y: number, content: string, attributes: Attributes = {}): string =>
  element('text', { x, y, ...attributes }, escapeXml(content));

/** A path through points. */
export const pathThrough = (points: readonly (readonly [number, number])[], closed = false): string =>
  points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${px(x)} ${px(y)}`).join('') + (closed ? 'Z' : '');
