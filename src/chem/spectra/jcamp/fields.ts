import { DomainError } from '../../errors.ts';
import { type JcampRecord, textOf } from './records.ts';

/** A number of a record with the size of half a unit of its last digit, in which its writer may have rounded it. */
export interface StatedNumber {
  value: number;
  rounding: number;
  decimalComma: boolean;
  line: number;
}

const NUMBER = /^[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d{1,3})?(?![\w.,])/;

/**
 * The number at the start of a record, or null when the record is absent or empty.
 *
 * @throws {DomainError} `unreadable` when something else stands there
 */
export function numberOf(record: JcampRecord | undefined): StatedNumber | null {
  const text = textOf(record);
  if (record === undefined || text === '') return null;
  const found = text.match(NUMBER)?.[0];
  const value = found === undefined ? Number.NaN : Number(found.replace(',', '.'));
  if (found === undefined || !Number.isFinite(value)) {
    throw new DomainError('unreadable', `${record.spelling} must be a number; "${text}" is not`, 'file', record.line);
  }
  return { value, rounding: halfUnit(found), decimalComma: found.includes(','), line: record.line };
}

/** Half a unit of the last digit written: 0.05 for `12.3`, 0.5 for `12`, 5 for `1.2E+02`. */
export function halfUnit(written: string): number {
  const [mantissa = '', exponent = '0'] = written.toLowerCase().split('e');
  const decimals = mantissa.replace(',', '.').split('.')[1]?.length ?? 0;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}
