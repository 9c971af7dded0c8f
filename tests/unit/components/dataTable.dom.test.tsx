import { afterEach, describe, expect, it } from 'vitest';
import { cleanup, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { DataTable, tabulate } from '../../../src/components/DataTable.tsx';
import type { Column } from '../../../src/components/DataTable.tsx';

interface Row {
  readonly name: string;
  readonly value: number | null;
}
const columns: readonly Column<Row>[] = [
  { key: 'name', head: 'name', value: ({ name }) => name },
  { key: 'value', head: 'value', unit: 'K', isNumeric: true, value: ({ value }) => value },
];
const rows: readonly Row[] = [
  { name: 'b', value: 30 },
  { name: 'a', value: null },
  { name: 'c', value: 4 },
];

afterEach(cleanup);

function firstCells(): (string | null)[] {
  return screen
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('cell')[0]?.textContent ?? null);
}

describe('a table', () => {
  it('sorts by a head, up and then down, and says so', async () => {
    render(
      <DataTable caption="Things" columns={columns} rows={rows} rowKey={({ name }) => name} />,
    );
    const button = screen.getByRole('button', { name: /value/ });
    await userEvent.click(button);
    expect(firstCells()).toEqual(['c', 'b', 'a']);
    expect(button.closest('th')?.getAttribute('aria-sort')).toBe('ascending');
    await userEvent.click(button);
    expect(button.closest('th')?.getAttribute('aria-sort')).toBe('descending');
  });

  it('writes CSV with units in the heads and texts quoted where they must be', () => {
    const text = tabulate(columns, [{ name: 'a "b", c', value: 1.5 }, ...rows.slice(1, 2)], ',');
    expect(text).toBe('name,value [K]\n"a ""b"", c",1.5\na,\n');
  });

  it('never hands a spreadsheet a text that it would take for a formula', () => {
    expect(tabulate(columns, [{ name: '=HYPERLINK("x")', value: -1 }], ',')).toContain(
      `"'=HYPERLINK(""x"")",-1`,
    );
  });
});
