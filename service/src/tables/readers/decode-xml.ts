const ENTITIES = new Map([
  ['lt', '<'],
  ['gt', '>'],
  ['amp', '&'],
  ['quot', '"'],
  ['apos', "'"],
]);

/** Decodes the five entities of XML and character references; any other stays as it stands. */
export function decodeXml(text: string): string {
  if (!text.includes('&')) return text;
  return text.replace(
    /&(?:#x([\da-f]{1,6})|#(\d{1,7})|([a-z]+));/gi,
    (whole, hex?: string, decimal?: string, name?: string) => {
      if (name !== undefined) return ENTITIES.get(name) ?? whole;
      const code = hex === undefined ? Number(decimal) : parseInt(hex, 16);
      return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : whole;
    },
  );
}
