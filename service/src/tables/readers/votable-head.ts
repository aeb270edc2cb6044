import { XMLParser } from 'fast-xml-parser';
import { type ColumnFacts, type ReaderLimits, TableError, type TableFacts } from '../table.ts';
import { uniqueNames } from './column-names.ts';
import { decodeXml } from './decode-xml.ts';

export type VotableDatatype =
  | 'boolean'
  | 'bit'
  | 'unsignedByte'
  | 'short'
  | 'int'
  | 'long'
  | 'char'
  | 'unicodeChar'
  | 'float'
  | 'double'
  | 'floatComplex'
  | 'doubleComplex';

/** One FIELD as the decoders need it. */
export interface VotableField {
  datatype: VotableDatatype;
  /** Elements in a cell, or null when every cell tells its own. */
  length: number | null;
  isArray: boolean;
  nullMark?: string;
}

export interface VotableTable {
  facts: TableFacts;
  fields: VotableField[];
}

interface Element {
  name: string;
  attributes: Record<string, string>;
  children: Element[];
  text: string;
}

/** Old and lenient spellings of datatypes met in files. */
const DATATYPES: Record<string, VotableDatatype> = {
  boolean: 'boolean', bit: 'bit', unsignedByte: 'unsignedByte', short: 'short', int: 'int', long: 'long', char: 'char',
  unicodeChar: 'unicodeChar', float: 'float', double: 'double', floatComplex: 'floatComplex', doubleComplex: 'doubleComplex',
  string: 'char', unicodeString: 'unicodeChar', int16: 'short', int32: 'int', int64: 'long', float32: 'float', float64: 'double',
  unsignedInt: 'long', unsignedShort: 'int', integer: 'int',
}; // prettier-ignore

/** Reads tables, columns and frames from the markup of a VOTable (1.0 to 1.5, any namespace). */
export function readVotableHead(skeleton: string, limits: ReaderLimits): VotableTable[] {
  const root = parse(skeleton);
  const votable = root.find((element) => element.name === 'VOTABLE');
  if (votable === undefined) {
    throw new TableError('not-a-table', 'The XML document is not a VOTable.', 'Upload a VOTable, FITS or CSV file.', {
      byte: 0,
    });
  }
  const frames = new Map<string, string>();
  collectFrames(votable, frames);
  const tables: VotableTable[] = [];
  collectTables(votable, undefined, (table, resource) => {
    tables.push(readTable(table, resource, tables.length, frames, limits, votable));
  });
  if (tables.length > 0) return tables;
  throw new TableError('not-a-table', `The VOTable holds no table${serviceError(votable)}.`, 'Repeat the query.', {
    byte: 0,
  });
}

function parse(skeleton: string): Element[] {
  const parser = new XMLParser({
    preserveOrder: true,
    ignoreAttributes: false,
    attributeNamePrefix: '',
    removeNSPrefix: true,
    parseTagValue: false,
    parseAttributeValue: false,
    processEntities: false,
    trimValues: false,
  });
  let tree: unknown;
  try {
    tree = parser.parse(skeleton);
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    throw new TableError('bad-header', `The head of the VOTable cannot be read (${detail}).`, 'Export it again.', {
      byte: 0,
    });
  }
  return toElements(tree as Record<string, unknown>[]);
}

function toElements(nodes: Record<string, unknown>[]): Element[] {
  return nodes.flatMap((node) => {
    const name = Object.keys(node).find((key) => key !== ':@' && key !== '#text');
    if (name === undefined) return [];
    const inner = node[name] as Record<string, unknown>[];
    const raw = (node[':@'] ?? {}) as Record<string, string>;
    const attributes = Object.fromEntries(Object.entries(raw).map(([key, value]) => [key, decodeXml(String(value))]));
    const text = inner.map((child) => ('#text' in child ? decodeXml(String(child['#text'])) : '')).join('');
    return [{ name, attributes, children: toElements(inner), text: text.replace(/\s+/g, ' ').trim() }];
  });
}

function collectFrames(element: Element, frames: Map<string, string>): void {
  const { system, equinox, ID } = element.attributes;
  if (element.name === 'COOSYS' && system !== undefined)
    frames.set(ID ?? '', equinox ? `${system} ${equinox}` : system);
  for (const child of element.children) collectFrames(child, frames);
}

function collectTables(
  element: Element,
  resource: Element | undefined,
  found: (table: Element, resource?: Element) => void,
) {
  for (const child of element.children) {
    if (child.name === 'TABLE') found(child, resource);
    else collectTables(child, child.name === 'RESOURCE' ? child : resource, found);
  }
}

function readTable(
  table: Element,
  resource: Element | undefined,
  index: number,
  frames: Map<string, string>,
  limits: ReaderLimits,
  root: Element,
) {
  const elements = fieldsOf(table, root);
  if (elements.length > limits.maxColumns) {
    throw new TableError(
      'too-many-columns',
      `Table ${index + 1} has ${elements.length} columns, more than the limit of ${limits.maxColumns}.`,
      'Keep only the columns that are needed, or have the limit on columns raised.',
      { column: limits.maxColumns + 1 },
    );
  }
  const notes: string[] = [];
  const shared = sharedValues(root);
  const names = uniqueNames(
    elements.map(({ attributes }) => attributes['name'] ?? attributes['ID'] ?? ''),
    notes,
  );
  const fields = elements.map((element, i) => readField(element, names[i]!, shared, notes));
  const columns = fields.map((field, i) => describe(field, elements[i]!, names[i]!));
  const description = childText(table, 'DESCRIPTION') || (resource && childText(resource, 'DESCRIPTION'));
  const refs = elements
    .map(({ attributes }) => frames.get(attributes['ref'] ?? '\n'))
    .filter((frame) => frame !== undefined);
  const frame = refs[0] ?? (frames.size === 1 ? [...frames.values()][0] : undefined);
  const nrows = table.attributes['nrows'] ?? '';
  const facts: TableFacts = {
    index,
    name: table.attributes['name'] ?? table.attributes['ID'] ?? resource?.attributes['name'] ?? `table ${index + 1}`,
    columns,
    declaredRows: /^\d+$/.test(nrows) ? Number(nrows) : null,
    notes,
  };
  if (description) facts.description = description;
  if (frame !== undefined) facts.frame = frame;
  return { facts, fields };
}

/** VALUES elements that others refer to by their ID. */
function sharedValues(root: Element, found = new Map<string, Element>()): Map<string, Element> {
  const id = root.attributes['ID'];
  if (root.name === 'VALUES' && id !== undefined) found.set(id, root);
  for (const child of root.children) sharedValues(child, found);
  return found;
}

/** A table without columns of its own may refer to another that has them. */
function fieldsOf(table: Element, root: Element): Element[] {
  const own = table.children.filter((child) => child.name === 'FIELD');
  const ref = table.attributes['ref'];
  if (own.length > 0 || ref === undefined) return own;
  let model: Element | undefined;
  collectTables(root, undefined, (other) => {
    if (other.attributes['ID'] === ref) model ??= other;
  });
  return model?.children.filter((child) => child.name === 'FIELD') ?? [];
}

function readField(element: Element, name: string, shared: Map<string, Element>, notes: string[]): VotableField {
  const { attributes, children } = element;
  const written = attributes['datatype'] ?? '';
  let datatype = Object.hasOwn(DATATYPES, written) ? DATATYPES[written] : undefined;
  if (datatype === undefined) {
    notes.push(`Column ${name} has the unknown datatype "${written}" and is read as text.`);
    datatype = 'char';
  }
  const size = (attributes['arraysize'] ?? '').trim();
  const text = datatype === 'char' || datatype === 'unicodeChar';
  const factors = size.split('x').map((factor) => factor.trim());
  const variable = size.includes('*') || (text && written !== datatype && size === '');
  const length = size === '' || variable ? 1 : factors.reduce((product, factor) => product * (Number(factor) || 1), 1);
  const values = children
    .filter((child) => child.name === 'VALUES')
    .map((child) => shared.get(child.attributes['ref'] ?? '') ?? child);
  const nullMark = values.find((child) => child.attributes['null'] !== undefined)?.attributes['null'];
  return {
    datatype,
    length: variable ? null : length,
    isArray: variable || (size !== '' && size !== '1'),
    ...(nullMark === undefined || nullMark === '' ? {} : { nullMark }),
  };
}

function describe(field: VotableField, element: Element, name: string): ColumnFacts {
  const { datatype, isArray, nullMark } = field;
  const isText =
    datatype === 'char' || datatype === 'unicodeChar' || datatype === 'bit' || datatype.endsWith('Complex');
  const scalar =
    datatype === 'boolean' ? 'boolean' : datatype === 'float' || datatype === 'double' ? 'number' : 'integer';
  const facts: ColumnFacts = { name, type: isText || isArray ? 'text' : scalar };
  const { unit, ucd, arraysize } = element.attributes;
  const description = childText(element, 'DESCRIPTION');
  if (unit?.trim() && !/^-+$/.test(unit.trim())) facts.unit = unit.trim();
  if (ucd?.trim()) facts.ucd = ucd.trim();
  if (description) facts.description = description;
  if (nullMark !== undefined) facts.nullMark = nullMark;
  if (isArray && !(datatype === 'char' || datatype === 'unicodeChar')) facts.arraySize = arraysize!.trim();
  return facts;
}

function childText(element: Element, name: string): string {
  return element.children.find((child) => child.name === name)?.text ?? '';
}

/** What a service said went wrong, when the file is its answer to a failed query. */
function serviceError(votable: Element): string {
  const all = (element: Element): Element[] => [element, ...element.children.flatMap(all)];
  const info = all(votable).find(({ name, attributes }) => {
    const key = (attributes['name'] ?? '').toUpperCase();
    const failed = key === 'ERROR' || (key === 'QUERY_STATUS' && attributes['value']?.toUpperCase() === 'ERROR');
    return (name === 'INFO' || name === 'PARAM') && failed;
  });
  if (info === undefined) return '';
  return `; the service answered: ${(info.text || info.attributes['value'] || 'error').slice(0, 300)}`;
}
