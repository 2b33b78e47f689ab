import canonicalize from 'canonicalize';

/** Thrown for a value that has no canonical JSON; nothing is ever dropped from what is signed (R3). */
export class CanonicalError extends Error {
  constructor(
    readonly path: string,
    readonly what: string,
  ) {
    super(`${path === '' ? 'The value' : path} is ${what}, which has no canonical form.`);
    this.name = 'CanonicalError';
  }
}

/** Surrogates that do not pair up. */
const LONE_SURROGATE = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

function refuseUnlessJson(value: unknown, path: string, above: ReadonlySet<object>): void {
  switch (typeof value) {
    case 'boolean':
      return;
    case 'string':
      if (LONE_SURROGATE.test(value)) throw new CanonicalError(path, 'text with half a character');
      return;
    case 'number':
      if (!Number.isFinite(value)) throw new CanonicalError(path, String(value));
      if (Object.is(value, -0)) throw new CanonicalError(path, 'minus zero');
      return;
    case 'object': {
      if (value === null) return;
      if (above.has(value)) throw new CanonicalError(path, 'inside itself');
      const within = new Set(above).add(value);
      if (Array.isArray(value)) {
        for (let index = 0; index < value.length; index++)
          refuseUnlessJson(value[index], `${path}[${index}]`, within);
        return;
      }
      const prototype: unknown = Object.getPrototypeOf(value);
      if (prototype !== Object.prototype && prototype !== null)
        throw new CanonicalError(path, `a ${value.constructor.name}`);
      for (const [key, member] of Object.entries(value)) {
        if (LONE_SURROGATE.test(key)) throw new CanonicalError(path, 'named with half a character');
        refuseUnlessJson(member, path === '' ? key : `${path}.${key}`, within);
      }
      return;
    }
    default:
      throw new CanonicalError(path, typeof value);
  }
}

/**
 * Canonical JSON (RFC 8785) as text; its UTF-8 bytes are what is hashed. Throws {@link CanonicalError} for
 * `undefined`, BigInt, Date, −0, NaN, functions, lone surrogates and anything else JSON would drop or bend.
 */
export function canonicalJson(value: unknown): string {
  refuseUnlessJson(value, '', new Set());
  const text = canonicalize(value);
  if (text === undefined) throw new CanonicalError('', 'nothing');
  return text;
}

/** Whether a text is the canonical JSON of what it says. */
export function isCanonical(text: string): boolean {
  try {
    return canonicalJson(JSON.parse(text)) === text;
  } catch {
    return false;
  }
}
