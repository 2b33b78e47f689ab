import { Linter } from 'eslint';
import { parser } from 'typescript-eslint';
import { describe, expect, it } from 'vitest';
import { importDirections } from '@/lib/local/lint/import-directions.mjs';

const root = '/project';

/** What the rule says about one line of code in a file, by ESLint itself. */
function faults(file: string, code: string): string[] {
  const linter = new Linter({ cwd: root });
  const messages = linter.verify(
    code,
    {
      files: ['**/*.ts', '**/*.tsx'],
      languageOptions: { parser, sourceType: 'module' },
      plugins: { own: { rules: { directions: importDirections } } },
      rules: { 'own/directions': ['error', root] },
    },
    `${root}/${file}`,
  );
  return messages.map((message) => message.message);
}

// The directions of the contributor guide's map, one line each.
describe('an import against the directions is an error', () => {
  it.each([
    ['app/page.tsx', "import { x } from '@/db/client'"],
    ['app/page.tsx', "import { x } from '@/lib/adapters/stripe'"],
    ['app/page.tsx', "import { x } from '../lib/engine/price'"],
    ['components/job/card.tsx', "import { x } from '@/lib/services/job/list'"],
    ['components/job/card.tsx', "import { Scene } from 'three'"],
    ['components/job/card.tsx', "const x = import('@react-three/fiber')"],
    ['components/job/card.tsx', "import Stripe from 'stripe'"],
    ['db/schema/job.ts', "import { x } from '@/lib/services/job/list'"],
    ['lib/adapters/mail.ts', "import { x } from '@/db/client'"],
    ['lib/contracts/survey.ts', "import { x } from '@/lib/engine/price'"],
    ['lib/engine/price.ts', "import type { X } from '@/lib/contracts/survey'"],
    ['lib/engine/price.ts', "import fs from 'node:fs'"],
    ['lib/record/seal.ts', "export * from '../engine/types'"],
    ['lib/services/job/list.ts', "import { x } from '@/lib/local/settings'"],
    ['lib/services/job/list.ts', "import { x } from '@/db/seed/seed'"],
    ['lib/services/job/list.ts', "import { x } from '../../../tests/fixtures/kitchen'"],
    ['lib/services/mail/send.ts', "import nodemailer from 'nodemailer'"],
    ['middleware.ts', "import { x } from './lib/services/session/resolve-actor'"],
  ])('%s: %s', (file, code) => {
    expect(faults(file, code)).toEqual([expect.stringMatching(/may not import|may only be imported in/)]);
  });
});

describe('an import along the directions is not', () => {
  it.each([
    ['app/page.tsx', "import { x } from '@/lib/services/job/list'"],
    ['app/[company]/page.tsx', "import { x } from '../answer'"],
    ['components/scene/room.tsx', "import { Scene } from 'three'; import { x } from '@react-three/drei'"],
    ['components/payment/form.tsx', "import { x } from '@stripe/react-stripe-js'"],
    ['db/schema/job.ts', "import { x } from './columns'; import { y } from '@/lib/contracts/states'"],
    ['db/seed/seed.ts', "import { x } from '@/lib/services/job/create'"],
    ['lib/contracts/survey.ts', "import type { X } from '@/lib/engine/types'; import { z } from 'zod'"],
    ['lib/record/seal.ts', "import { type X } from '../engine/types'"],
    ['lib/services/job/list.ts', "import { x } from '@/db/client'; import { y } from '@/lib/adapters/clock'"],
    ['middleware.ts', "import { x } from '@clerk/nextjs/server'; import { y } from '@/lib/paths'"],
    ['tests/e2e/sign.test.ts', "import { x } from '@/lib/local/settings'"],
  ])('%s: %s', (file, code) => {
    expect(faults(file, code)).toEqual([]);
  });
});
