import { ClerkAPIResponseError } from '@clerk/nextjs/errors';
import { describe, expect, it } from 'vitest';
import { isUnknownAddress, problemOf } from '@/components/sign-in/problem';

const contractor = { name: 'Tern Hollow' };
const refusal = (code: string, retryAfter?: number) =>
  new ClerkAPIResponseError('refused', {
    data: [{ code, message: 'English of the service' }],
    status: 422,
    ...(retryAfter === undefined ? {} : { retryAfter }),
  });

// Codes from the service's published list of errors of its frontend interface.
const CODES = [
  'form_identifier_not_found',
  'form_param_format_invalid',
  'form_code_incorrect',
  'verification_expired',
  'verification_failed',
  'too_many_requests',
  'form_password_incorrect',
  'user_locked',
  'strategy_for_user_invalid',
  'form_password_length_too_short',
  'form_password_pwned',
];

describe('what the sign-in service refused', () => {
  it.each(CODES)('%s is said in a sentence of our own', (code) => {
    const { sentence } = problemOf(refusal(code), contractor);
    expect(sentence).not.toBe(problemOf(refusal('never heard of'), contractor).sentence);
    expect(sentence).toMatch(/^[A-Z].*\.$/);
    expect(sentence).not.toMatch(/!|English of the service/);
  });

  it('stands at the field that it is about', () => {
    expect(problemOf(refusal('form_identifier_not_found'), contractor).field).toBe('email');
    expect(problemOf(refusal('form_code_incorrect'), contractor).field).toBe('code');
    expect(problemOf(refusal('form_password_incorrect'), contractor).field).toBe('password');
  });

  it('asks for a new code only where no other helps', () => {
    const needing = CODES.filter((code) => problemOf(refusal(code), contractor).newCode);
    expect(needing).toEqual(['verification_expired', 'verification_failed']);
  });

  it('says how long to wait as the service says it', () => {
    const limited = problemOf(refusal('too_many_requests', 481), contractor);
    expect([limited.waitSeconds, limited.sentence]).toEqual([481, expect.stringContaining('9 minutes')]);
  });

  it('is a lost connection when it is no answer of the service', () => {
    expect(problemOf(new TypeError('Failed to fetch'), contractor).sentence).toContain('cannot be reached');
    expect(isUnknownAddress(new TypeError('Failed to fetch'))).toBe(false);
    expect(isUnknownAddress(refusal('form_identifier_not_found'))).toBe(true);
  });
});
