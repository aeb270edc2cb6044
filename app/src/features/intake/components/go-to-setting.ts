/** Leads to the field of a setting, or to the nearest that holds it. */
export function goToSetting(pointer: string): void {
  const holds = (own: string) => pointer === own || pointer.startsWith(`${own}/`);
  const fields = [...document.querySelectorAll<HTMLElement>('[data-pointer]')]
    .filter(({ dataset }) => holds(dataset['pointer']!))
    .sort((a, b) => b.dataset['pointer']!.length - a.dataset['pointer']!.length);
  const field = fields[0];
  if (!field) return;
  field.scrollIntoView({ block: 'center' });
  const control = field.querySelector<HTMLElement>('input:not([type=file]), select, textarea') ?? field;
  control.focus({ preventScroll: true });
}
