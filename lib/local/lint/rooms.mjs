/**
 * Who may import whom. The longest place that a file lies at or below is its room; `imports` are the places it may
 * import from, `types` those it may import types from. A room may always import from itself.
 */
export const ROOMS = [
  { room: 'app', imports: ['components', 'lib/services', 'lib/contracts', 'lib/paths'] },
  { room: 'components', imports: ['components/scene', 'lib/engine', 'lib/contracts', 'lib/paths'] },
  { room: 'components/scene', imports: ['components', 'lib/engine', 'lib/contracts', 'lib/paths'] },
  { room: 'db', imports: ['lib/contracts'], types: ['lib/engine'] },
  {
    room: 'db/seed',
    imports: ['db', 'lib/services', 'lib/adapters', 'lib/engine', 'lib/record', 'lib/contracts', 'lib/paths'],
  },
  { room: 'lib/engine', imports: [] },
  { room: 'lib/record', imports: ['lib/contracts'], types: ['lib/engine'] },
  // Beside types: how a length is read, and the lists of keys and zones.
  { room: 'lib/contracts', imports: ['lib/engine/length', 'lib/engine/types'], types: ['lib/engine'] },
  { room: 'lib/paths', imports: [] },
  { room: 'lib/adapters', imports: ['lib/contracts'] },
  {
    room: 'lib/services',
    imports: ['db', 'lib/adapters', 'lib/engine', 'lib/record', 'lib/contracts', 'lib/paths'],
  },
  {
    room: 'lib/cli',
    imports: ['db', 'lib/services', 'lib/adapters', 'lib/engine', 'lib/record', 'lib/contracts', 'lib/paths'],
  },
  { room: 'middleware', imports: ['lib/paths'] },
  { room: 'lib/local', imports: 'anything' },
  { room: 'tests', imports: 'anything' },
];

/** Packages that stay behind one door: name (or scope with `/`) and the rooms that may import them. */
export const PACKAGES = [
  { names: ['three', '@react-three/'], rooms: ['components/scene'] },
  { names: ['stripe'], rooms: ['lib/adapters'] },
  { names: ['@stripe/'], rooms: ['components'] },
  { names: ['@clerk/'], rooms: ['lib/adapters', 'middleware', 'components', 'app'] },
  { names: ['nodemailer', 'pg-boss', 'pdfkit', '@aws-sdk/'], rooms: ['lib/adapters'] },
  { names: ['postgres'], rooms: ['db'] },
];

/** The computation is pure: these packages of tables are all it may use. */
export const ENGINE_PACKAGES = ['@18f/us-federal-holidays'];
