import type { PageEnvelope } from '@/lib/contracts/page';
import { canonicalJson } from './canonical';
import { sha256Hex } from './hash';

/** A page's envelope as canonical JSON, and its hash, which is the page's seal (R2). Throws `CanonicalError`. */
export async function sealPage(
  envelope: PageEnvelope,
): Promise<{ readonly text: string; readonly sha256: string }> {
  const text = canonicalJson(envelope);
  return { text, sha256: await sha256Hex(text) };
}
