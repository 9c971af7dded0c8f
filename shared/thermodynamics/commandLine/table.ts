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

/** Numbers in nine figures, aligned on the point by whoever pads them. */
export function figure(value: number): string {
  if (value === 0) return '0';
  const magnitude = Math.abs(value);
  if (magnitude >= 1e-3 && magnitude < 1e6) return String(Number(value.toPrecision(9)));
  return value
    .toExponential(8)
    .replace(/\.?0+e/, 'e')
    .replace('e+', 'e');
}
