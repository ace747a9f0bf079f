/** How a fill-in reads in running text: its value with unit, or the hole with its label. */
export function fillInText({
  label,
  unit,
  value,
}: {
  label?: string;
  unit?: string;
  value?: string;
}): string {
  if (value) return unit ? `${value} ${unit}` : value;
  return `[${label ?? 'fill in'}${unit ? `, ${unit}` : ''}]`;
}
