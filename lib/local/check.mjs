import { handOver } from './hand-over.mjs';

handOver('check.ts');
