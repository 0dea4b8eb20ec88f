import { expect, test } from 'vitest';
import { type DataColumn, tableCsv } from '#src/components/ui/table-csv.ts';

const columns: DataColumn<{ name: string; shift: number | null }>[] = [
  { id: 'name', header: 'Name', value: (row) => row.name },
  { id: 'shift', header: 'Shift (cm−1)', value: (row) => row.shift },
];

test('quotes and commas are kept (RFC 4180), absent values are empty, numbers stay numbers', () => {
  const csv = tableCsv(columns, [
    { name: 'a "b", c', shift: -12.5 },
    { name: 'd', shift: null },
  ]);
  expect(csv).toBe('Name,Shift (cm−1)\r\n"a ""b"", c",-12.5\r\nd,');
});

test('what a spreadsheet would run is made plain text', () => {
  expect(tableCsv(columns, [{ name: '=HYPERLINK("x")', shift: 1 }])).toContain(`"'=HYPERLINK(""x"")"`);
});
