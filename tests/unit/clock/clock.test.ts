import { afterEach, describe, expect, it, vi } from 'vitest';
import { now } from '@/lib/adapters/clock';

afterEach(() => vi.unstubAllEnvs());

describe('the clock', () => {
  it('can be stopped where something stands in for a real service', () => {
    vi.stubEnv('STILEWRIGHT_CLOCK', '2026-07-01T12:00:00Z');
    for (const [environment, base] of [
      ['test', ''],
      ['production', 'http://localhost:4320'],
    ]) {
      vi.stubEnv('NODE_ENV', environment ?? '');
      vi.stubEnv('STRIPE_API_BASE', base ?? '');
      expect(now().toISOString()).toBe('2026-07-01T12:00:00.000Z');
    }
  });

  it('cannot be stopped in production beside the real services', () => {
    vi.stubEnv('STILEWRIGHT_CLOCK', '2001-07-01T12:00:00Z');
    vi.stubEnv('NODE_ENV', 'production');
    vi.stubEnv('STRIPE_API_BASE', '');
    expect(now().getUTCFullYear()).toBeGreaterThan(2001);
  });

  it('that is set to no instant stops the work, not the clock', () => {
    vi.stubEnv('STILEWRIGHT_CLOCK', 'noon');
    expect(() => now()).toThrow('noon');
  });
});
