import { handOver } from './hand-over.mjs';

handOver('start.ts');
