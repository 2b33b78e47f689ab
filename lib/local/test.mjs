import { handOver } from './hand-over.mjs';

handOver('tests.ts');
