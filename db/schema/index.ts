export * from './book';
export * from './company';
export * from './job';
export * from './money';
export * from './person';
export * from './record';
export * from './scheme';
