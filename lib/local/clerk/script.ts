import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { root } from '../places';
import { notFound } from './fault';
import type { Answer } from './http';

const ADDRESS = /^\/npm\/@clerk\/clerk-js@[^/]+\/dist\/([\w.-]+\.js)$/;

/** Whether an address is the browser's library or a part of it. */
export const isScript = (address: string): boolean => ADDRESS.test(address);

/** The browser's library as its package ships it. */
export function answerScript(address: string): Answer {
  const [, file = ''] = ADDRESS.exec(address) ?? [];
  const place = path.join(root, 'node_modules', '@clerk', 'clerk-js', 'dist', path.basename(file));
  if (!existsSync(place)) throw notFound(`script ${file}`);
  return {
    status: 200,
    body: readFileSync(place),
    headers: { 'content-type': 'text/javascript; charset=utf-8', 'cache-control': 'public, max-age=3600' },
  };
}
