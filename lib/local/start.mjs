import { handOver } from './hand-over.mjs';

handOver('stack.ts');
