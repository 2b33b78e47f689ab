import { config } from 'zod/v4/core';

// Runs before any other module of the page. Shapes would else try to compile code, which the page's policy refuses
// and reports.
config({ jitless: true });
