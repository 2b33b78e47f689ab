/** What a form-encoded body with brackets (`a[b][0]=x`) says: texts, lists and nested records. */
export type FormValue = string | FormValue[] | FormRecord;
export interface FormRecord {
  [key: string]: FormValue;
}

const FORBIDDEN = new Set(['__proto__', 'constructor', 'prototype']);

function toLists(value: FormValue): FormValue {
  if (typeof value === 'string' || Array.isArray(value)) return value;
  const entries = Object.entries(value).map(([key, inner]): [string, FormValue] => [key, toLists(inner)]);
  const isList = entries.length > 0 && entries.every(([key], index) => key === String(index));
  return isList ? entries.map(([, inner]) => inner) : Object.fromEntries(entries);
}

/** Parses a form-encoded body or query. Lists may be written `a[]=x` or `a[0]=x`. */
export function parseForm(text: string): FormRecord {
  const root: FormRecord = {};
  for (const [name, value] of new URLSearchParams(text)) {
    const keys = [name.split('[')[0] ?? '', ...[...name.matchAll(/\[([^\]]*)\]/g)].map((m) => m[1] ?? '')];
    if (keys.some((key) => FORBIDDEN.has(key))) continue;
    let place = root;
    keys.forEach((written, depth) => {
      const key = written === '' && depth > 0 ? String(Object.keys(place).length) : written;
      if (depth === keys.length - 1) {
        place[key] = value;
        return;
      }
      const inner = place[key];
      const next = typeof inner === 'object' && !Array.isArray(inner) ? inner : {};
      place[key] = next;
      place = next;
    });
  }
  return Object.fromEntries(Object.entries(root).map(([key, value]) => [key, toLists(value)]));
}

/** The text at `path`, or undefined when there is none. */
export function textAt(form: FormRecord, ...path: string[]): string | undefined {
  let value: FormValue | undefined = form;
  for (const key of path) {
    if (typeof value !== 'object' || Array.isArray(value)) return undefined;
    value = value[key];
  }
  return typeof value === 'string' ? value : undefined;
}

/** The texts of a list at `key`; empty when there is none. */
export function listAt(form: FormRecord, key: string): string[] {
  const value = form[key];
  return Array.isArray(value) ? value.filter((one) => typeof one === 'string') : [];
}

/** A flat record of texts at `key`, as metadata is sent; empty when there is none. */
export function recordAt(form: FormRecord, key: string): Record<string, string> {
  const value = form[key];
  if (typeof value !== 'object' || Array.isArray(value)) return {};
  return Object.fromEntries(
    Object.entries(value).filter((entry): entry is [string, string] => typeof entry[1] === 'string'),
  );
}
