/** Makes column names unique and never empty; `notes` says what was changed. */
export function uniqueNames(names: string[], notes: string[]): string[] {
  const taken = new Set(names.map((name) => name.trim()));
  const seen = new Set<string>();
  return names.map((raw, index) => {
    const name = raw.trim();
    if (name !== '' && !seen.has(name)) {
      seen.add(name);
      return name;
    }
    const stem = name === '' ? 'column' : name;
    let number = name === '' ? index + 1 : 2;
    while (taken.has(`${stem}_${number}`) || seen.has(`${stem}_${number}`)) number++;
    const changed = `${stem}_${number}`;
    seen.add(changed);
    notes.push(
      name === ''
        ? `Column ${index + 1} has no name and is called ${changed}.`
        : `Column ${index + 1} repeats the name ${name} and is called ${changed}.`,
    );
    return changed;
  });
}
