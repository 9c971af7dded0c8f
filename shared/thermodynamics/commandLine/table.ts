/** Columns of text. */

/** Rows with every column but the last padded to one width; `right` names columns set right. */
export function table(rows: readonly (readonly string[])[], right: readonly number[] = []): string {
  const widths: number[] = [];
  for (const row of rows) {
    row.forEach((cell, i) => (widths[i] = Math.max(widths[i] ?? 0, [...cell].length)));
  }
  return rows
    .map((row) =>
      row
        .map((cell, i) => {
          const space = ' '.repeat(Math.max(0, (widths[i] ?? 0) - [...cell].length));
          if (right.includes(i)) return space + cell;
          return i === row.length - 1 ? cell : cell + space;
        })
        .join('  ')
        .trimEnd(),
    )
    .join('\n');
}

/** A number in nine figures. */
export function figure(value: number): string {
  if (value === 0) return '0';
  const magnitude = Math.abs(value);
  if (magnitude >= 1e-3 && magnitude < 1e6) return String(Number(value.toPrecision(9)));
  return value
    .toExponential(8)
    .replace(/\.?0+e/, 'e')
    .replace('e+', 'e');
}

/** Numbers padded on both sides so that their decimal points stand below each other. */
export function alignOnPoint(figures: readonly string[]): string[] {
  const pointOf = (text: string): number => {
    const end = /[.e]/.exec(text)?.index;
    return end ?? text.length;
  };
  const before = Math.max(0, ...figures.map(pointOf));
  const after = Math.max(0, ...figures.map((text) => text.length - pointOf(text)));
  return figures.map((text) =>
    text.padStart(before + text.length - pointOf(text)).padEnd(before + after),
  );
}
