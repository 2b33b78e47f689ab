import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { choicesShape } from '@/lib/contracts/choices';
import { parseEdition } from '@/lib/contracts/edition';
import { faultsOf } from '@/lib/contracts/faults';
import { parseSurvey } from '@/lib/contracts/survey';
import { termsShape } from '@/lib/contracts/terms';
import { openSums, planFaults, slackOn } from '@/lib/engine/closing';
import { facesOf } from '@/lib/engine/faces';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import { doorOrder, EngineError, optionsOf, takeoff, unfoldTotal } from '@/lib/engine/index';
import { formatLength, sixtyfourths } from '@/lib/engine/length';
import { formatCents } from '@/lib/engine/money';
import {
  type CHOICE_KEYS,
  type Choices,
  type MouldingEnd,
  type Survey,
  type Takeoff,
} from '@/lib/engine/types';

/** What a table of the take-off can show. */
const OUTPUTS = ['doors', 'mouldings', 'veneer', 'panels', 'boxes', 'price', 'notes', 'json'] as const;
type Output = (typeof OUTPUTS)[number];

const USAGE = `npm run -s takeoff -- SURVEY.json [--edition FILE] [--scheme FILE] [--terms FILE] [--out ${OUTPUTS.join('|')}]
Without an edition the survey alone is checked; without a scheme the first option of every key is taken. Ends with 2 when a file has faults, told by path.`;

/** Thickness of an end panel where no edition says it: a quarter inch. */
const PANEL = 16;

/** No discount and no tax, for a look at the bench. */
const PLAIN_TERMS: Terms = {
  version: 1,
  tax: { mode: 'none', basis: 'invoice', rates: {}, place: '' },
  discount: { kind: 'none' },
  crewSize: 2,
};

/** A file that cannot be used, with every fault by path. */
class FaultyFile extends Error {
  constructor(
    readonly file: string,
    readonly faults: readonly { readonly path: string; readonly message: string }[],
  ) {
    super(`${file} has faults.`);
  }
}

function readJson(file: string): unknown {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error);
    throw new FaultyFile(file, [{ path: '(file)', message }]);
  }
}

function readSurvey(file: string): Survey {
  const parsed = parseSurvey(readJson(file));
  if (!parsed.ok) throw new FaultyFile(file, parsed.faults);
  return parsed.value;
}

/** An edition's file may be a price book's: `{ edition, costs }`. */
function readEdition(file: string): Edition {
  const json = readJson(file);
  const inner = typeof json === 'object' && json !== null && 'edition' in json ? json.edition : json;
  const parsed = parseEdition(inner);
  if (!parsed.ok) throw new FaultyFile(file, parsed.faults);
  return parsed.value;
}

function readChoices(file: string): Choices {
  const parsed = choicesShape.safeParse(readJson(file));
  if (!parsed.success) throw new FaultyFile(file, faultsOf(parsed.error));
  return parsed.data;
}

function readTerms(file: string): Terms {
  const parsed = termsShape.safeParse(readJson(file));
  if (!parsed.success) throw new FaultyFile(file, faultsOf(parsed.error));
  return parsed.data;
}

/** The first option of every key, swapped to what goes together by the order of the edition. */
function firstChoices(edition: Edition): Choices {
  const first = (key: (typeof CHOICE_KEYS)[number]) => optionsOf(edition, key)[0]?.id ?? 'none';
  const species = edition.species[0];
  const finish = edition.finishes.find(
    (one) =>
      species?.finishes.includes(one.family) === true &&
      (one.colours === undefined || one.colours[species.id] !== undefined),
  );
  return {
    version: 1,
    kitchen: {
      style: first('style'),
      species: first('species'),
      finish: finish?.id ?? first('finish'),
      overlay: first('overlay'),
      pull: first('pull'),
      crown: first('crown'),
      base: first('base'),
      lightRail: first('lightRail'),
      ends: first('ends'),
      drawerBox: first('drawerBox'),
      counter: first('counter'),
    },
    zones: {},
    inside: {},
  };
}

/** Rows under headings, columns as wide as they need. */
function table(head: readonly string[], rows: readonly (readonly string[])[]): string {
  const widths = head.map((title, column) =>
    Math.max(title.length, ...rows.map((row) => (row[column] ?? '').length)),
  );
  const line = (cells: readonly string[]) =>
    cells
      .map((cell, column) => cell.padEnd(widths[column] ?? 0))
      .join('  ')
      .trimEnd();
  return [line(head), line(widths.map((width) => '-'.repeat(width))), ...rows.map(line)].join('\n');
}

const degrees = (thousandths: number): string => (thousandths / 1000).toFixed(2);
const end = ({ kind, miter, bevel, longEdge }: MouldingEnd): string =>
  kind === 'stopped' ? 'square' : `${kind} ${degrees(miter)}/${degrees(bevel)}, long ${longEdge}`;

function show(out: Output, taken: Takeoff, survey: Survey, edition: Edition): string {
  const size = formatLength;
  switch (out) {
    case 'json':
      return JSON.stringify(taken, null, 2);
    case 'doors':
      return table(
        ['Mark', 'Kind', 'Width', 'Height', 'Style', 'Build', 'Wood', 'Finish', 'Hinge', 'Hinges', 'Glass'],
        doorOrder(taken, edition).map((row) => [
          row.mark,
          row.kind,
          row.width,
          row.height,
          row.style,
          row.build,
          row.wood,
          row.finish,
          row.hinge,
          String(row.hinges),
          row.glass ? 'yes' : '',
        ]),
      );
    case 'mouldings':
      return table(
        ['Mark', 'Kind', 'Profile', 'Back', 'Front', 'Left end', 'Right end'],
        taken.mouldings.map((piece) => [
          piece.mark,
          piece.kind,
          piece.profile,
          size(piece.backLength),
          size(piece.frontLength),
          end(piece.left),
          end(piece.right),
        ]),
      );
    case 'veneer':
      return [
        table(
          ['Mark', 'Member', 'Width', 'Length', 'Covers', 'Wood', 'Finish'],
          taken.veneer.map((strip) => [
            strip.mark,
            strip.member,
            size(strip.width),
            size(strip.length),
            strip.cabinets.join(' '),
            strip.species,
            strip.finish,
          ]),
        ),
        `Bonded ${(taken.bonded.area / 100).toFixed(2)} ft², adhesive ${(taken.bonded.gallons / 100).toFixed(2)} gal.`,
      ].join('\n\n');
    case 'panels':
      return table(
        ['Mark', 'Kind', 'Width', 'Height', 'Notch', 'Panels'],
        taken.panels.map((panel) => [
          panel.mark,
          panel.kind,
          size(panel.width),
          size(panel.height),
          panel.notch ? `${size(panel.notch.width)} × ${size(panel.notch.height)}` : '',
          panel.layout ? `${panel.layout.panels} of ${size(panel.layout.panelWidth)}` : '',
        ]),
      );
    case 'boxes':
      return table(
        ['Mark', 'Kind', 'Material', 'Width', 'Height', 'Length', 'Slide'],
        taken.boxes.map((box) => [
          box.mark,
          box.kind,
          box.material,
          size(box.width),
          size(box.height),
          size(box.length),
          box.slide,
        ]),
      );
    case 'notes': {
      const slack = survey.walls
        .filter((wall) => wall.kind === 'wall')
        .map((wall) => {
          const free = (tier: 'base' | 'wall') =>
            size(sixtyfourths(slackOn(survey, wall, edition.shop.panelThickness, tier)));
          return `${wall.id}: ${free('base')} in free below, ${free('wall')} in above`;
        });
      const notes = taken.notes.map(
        (note) =>
          `${note.severity}  ${note.rule}  ${note.code}  ${note.zone}${note.amount === undefined ? '' : `  ${formatCents(note.amount)}`}\n  ${note.bench}${note.wayOut ? `\n  Way out: ${note.wayOut.label} (${formatCents(note.wayOut.delta ?? 0)})` : ''}`,
      );
      return [...notes, ...slack].join('\n');
    }
    case 'price':
      return [
        table(
          ['Line', 'Zone', 'Quantity', 'Price', 'Amount', 'Because'],
          taken.lines.map((line) => [
            line.label,
            line.zone,
            line.quantityText,
            formatCents(line.unitPrice),
            formatCents(line.amount),
            line.because,
          ]),
        ),
        ...unfoldTotal(taken)
          .slice(taken.lines.length)
          .map((step) => `${step.mark.padEnd(9)} ${step.formula}`),
        taken.schedule.because,
      ].join('\n');
  }
}

/** What does not add up in a survey, with end panels of a quarter inch. */
function closingOf(survey: Survey): string[] {
  const faces = facesOf(survey);
  const length = (value: number) => `${formatLength(sixtyfourths(Math.round(value)))} in`;
  return [
    ...faces
      .flatMap(openSums)
      .map(
        (open) =>
          `${open.cabinet}: the ${open.along} of opening ${open.openings.join(', ')} comes to ${length(open.sum)}, the frame is ${length(open.should)}`,
      ),
    ...planFaults(survey, faces, PANEL).map(
      (fault) => `Wall ${fault.wall}: ${fault.ids.join(' and ')}, ${fault.kind}, by ${length(fault.by)}`,
    ),
  ];
}

function run(): number {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: {
      edition: { type: 'string' },
      scheme: { type: 'string' },
      terms: { type: 'string' },
      out: { type: 'string', default: 'price' },
      help: { type: 'boolean', default: false },
    },
  });
  const [file, ...more] = positionals;
  const out = OUTPUTS.find((one) => one === values.out);
  if (values.help || file === undefined || more.length > 0 || !out) {
    console.error(USAGE);
    return values.help ? 0 : 2;
  }
  const survey = readSurvey(file);
  if (values.edition === undefined) {
    const found = closingOf(survey);
    console.log(found.length === 0 ? 'The survey closes.' : found.join('\n'));
    return 0;
  }
  const edition = readEdition(values.edition);
  const choices = values.scheme === undefined ? firstChoices(edition) : readChoices(values.scheme);
  const terms = values.terms === undefined ? PLAIN_TERMS : readTerms(values.terms);
  console.log(show(out, takeoff(survey, edition, choices, terms), survey, edition));
  return 0;
}

try {
  process.exitCode = run();
} catch (error) {
  process.exitCode = 2;
  if (error instanceof FaultyFile) {
    console.error(error.message);
    for (const { path, message } of error.faults) console.error(`  ${path}: ${message}`);
  } else if (error instanceof EngineError) {
    console.error(`${error.message}`);
  } else {
    console.error(error instanceof Error ? error.message : String(error));
    console.error(USAGE);
  }
}
