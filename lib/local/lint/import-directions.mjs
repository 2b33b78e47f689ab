import path from 'node:path';
import { ENGINE_PACKAGES, PACKAGES, ROOMS } from './rooms.mjs';

const isWithin = (place, room) => place === room || place.startsWith(`${room}/`);

/** The room of a place, which is a path below the project's folder without an extension. */
function roomOf(place) {
  return ROOMS.filter(({ room }) => isWithin(place, room)).sort((a, b) => b.room.length - a.room.length)[0];
}

const packageMatches = (name, specifier) =>
  name.endsWith('/') ? specifier.startsWith(name) : specifier === name || specifier.startsWith(`${name}/`);

/** Where an import leads below the project's folder, or null for a package. */
function placeOf(specifier, fromFolder) {
  if (specifier.startsWith('@/'))
    return path.posix.normalize(specifier.slice(2)).replace(/\.(ts|tsx|mjs|js)$/, '');
  if (!specifier.startsWith('.')) return null;
  return path.posix.join(fromFolder, specifier).replace(/\.(ts|tsx|mjs|js)$/, '');
}

function faultOf(place, from, specifier, typesOnly) {
  const target = placeOf(specifier, path.posix.dirname(place));
  if (from.imports === 'anything') return null;
  if (target === null) {
    if (from.room === 'lib/engine' && !ENGINE_PACKAGES.includes(specifier)) {
      return `lib/engine is pure and may not import ${specifier}.`;
    }
    const owned = PACKAGES.find(({ names }) => names.some((name) => packageMatches(name, specifier)));
    if (!owned || owned.rooms.some((room) => isWithin(from.room, room))) return null;
    return `${specifier} may only be imported in ${owned.rooms.join(', ')}.`;
  }
  const to = roomOf(target);
  // Style sheets, data and the like at the top level belong to nobody.
  if (!to || to.room === from.room) return null;
  if (from.imports.some((room) => isWithin(target, room) && !isOutside(to.room, room, from))) return null;
  if (typesOnly && from.types?.includes(to.room)) return null;
  const types = from.types?.includes(to.room) ? ' (types alone may be imported)' : '';
  return `${from.room} may not import from ${to.room}${types}.`;
}

/** A room inside an allowed one is only meant when it does not reach out to what the importer may not touch. */
const isOutside = (target, allowed, from) =>
  target === 'db/seed' && allowed === 'db' && from.room !== 'db/seed';

/**
 * ESLint rule: every import keeps to the table in `rooms.mjs`. Option: the project's folder.
 * @type {import('eslint').Rule.RuleModule}
 */
export const importDirections = {
  meta: { type: 'problem', schema: [{ type: 'string' }], messages: { direction: '{{ fault }}' } },
  create(context) {
    const relative = path.relative(context.options[0], context.filename).split(path.sep).join('/');
    const place = relative.replace(/\.(test\.)?(ts|tsx|mjs|js)$/, '');
    const from = roomOf(place);
    if (!from) return {};
    const check = (node, source, typesOnly) => {
      if (typeof source?.value !== 'string') return;
      const fault = faultOf(place, from, source.value, typesOnly);
      if (fault) context.report({ node, messageId: 'direction', data: { fault } });
    };
    const allTypes = (kind, specifiers, key) =>
      kind === 'type' || (specifiers.length > 0 && specifiers.every((one) => one[key] === 'type'));
    return {
      ImportDeclaration: (node) =>
        check(node, node.source, allTypes(node.importKind, node.specifiers, 'importKind')),
      ExportNamedDeclaration: (node) =>
        node.source && check(node, node.source, allTypes(node.exportKind, node.specifiers, 'exportKind')),
      ExportAllDeclaration: (node) => check(node, node.source, node.exportKind === 'type'),
      ImportExpression: (node) => check(node, node.source, false),
    };
  },
};
