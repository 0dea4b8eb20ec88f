import type { SpectrumWarning } from '../types.ts';

/** One line of a record's value, comment removed; `line` is 1-based in the file. */
export interface ValueLine {
  text: string;
  line: number;
}

/** A labelled data record. */
export interface JcampRecord {
  /** Compared form of the label: upper case, without blanks, `-`, `/` and `_`. */
  label: string;
  /** The label as the file spells it. */
  spelling: string;
  line: number;
  value: ValueLine[];
}

/** Labels agree when they do after this (McDonald & Wilks 1988, section 4.2, from memory). */
export function normaliseLabel(label: string): string {
  return label.replace(/[\s\-/_]/g, '').toUpperCase();
}

/**
 * Labelled data records of a file, in order. `$$` starts a comment up to the end of its line; records without a label
 * are comments. Lines before the first record are left out with a warning.
 */
export function splitRecords(lines: readonly string[], warnings: SpectrumWarning[]): JcampRecord[] {
  const records: JcampRecord[] = [];
  let current: JcampRecord | null = null;
  let strayLine = 0;
  lines.forEach((raw, index) => {
    const line = index + 1;
    const head = raw.match(/^\s*##([^=]*)(=?)(.*)$/);
    if (head) {
      current = openRecord(head[1] ?? '', head[2] === '=', head[3] ?? '', line);
      if (current === null) warnings.push({ code: 'record-without-value', detail: 'a line of ## without =', line });
      else if (current.label !== '') records.push(current);
      return;
    }
    const text = withoutComment(raw);
    if (text.trim() === '') return;
    if (current) current.value.push({ text, line });
    else if (records.length === 0 && strayLine === 0) strayLine = line;
  });
  if (strayLine > 0) {
    warnings.push({ code: 'text-before-record', detail: 'text before the first record was left out', line: strayLine });
  }
  return records;
}

function openRecord(spelling: string, hasValue: boolean, rest: string, line: number): JcampRecord | null {
  const name = withoutComment(spelling).trim();
  const label = normaliseLabel(name);
  if (!hasValue && label !== 'END') return null;
  const text = withoutComment(rest).trim();
  return { label, spelling: name, line, value: text === '' ? [] : [{ text, line }] };
}

function withoutComment(text: string): string {
  const at = text.indexOf('$$');
  return at < 0 ? text : text.slice(0, at);
}

/** Value of a record on one line. */
export function textOf(record: JcampRecord | undefined): string {
  return record ? record.value.map(({ text }) => text.trim()).join(' ') : '';
}
