import { applyChange, clash, chosenIn } from './choices';
import { openSums, planFaults } from './closing';
import { projectionOf } from './crown';
import type { MouldingProfile, Overlay } from './edition-types';
import { endOf } from './faces';
import { leadReading, rangeReadings } from './hazards';
import { formatCents, cents } from './money';
import { panelMovement, panelWidth } from './movement';
import { placeOn } from './plan';
import { lineDrafts, sumOf } from './price';
import { quantities, type Quantities } from './quantities';
import { revealFaults } from './reveals';
import { RULE_SETS } from './rule-sets';
import { strikes } from './strikes';
import type { EngineInput } from './takeoff';
import { ZONES, type Cents, type ChoiceChange, type FitNote, type Severity, type Zone } from './types';
import { sharesStrip, veneerStrips } from './veneer';
import { count, inch, list, marks, ZONE_NAMES } from './words';

/** Without a zone's own rule set the federal rule judges lead and ranges; it is the same in each state here. */
const FEDERAL = RULE_SETS.US;

interface Draft extends Omit<FitNote, 'wayOut'> {
  readonly wayOut?: { readonly label: string; readonly changes: readonly ChoiceChange[] } | undefined;
}

/**
 * What the computation finds about a kitchen with these choices, the gravest first. Every note names its rule, its
 * parts, a sentence for the homeowner and one for the bench; a way out carries its own difference.
 */
export function fitNotes(input: EngineInput, q: Quantities, total: Cents): FitNote[] {
  const drafts: Draft[] = [
    ...surveyNotes(input, q),
    ...choiceNotes(input, q),
    ...frontNotes(input, q),
    ...revealNotes(input, q),
    ...crownNotes(input, q),
    ...underNotes(input, q),
    ...baseNotes(input, q),
    ...doorNotes(input, q),
    ...boxNotes(input, q),
    ...veneerNotes(input, q),
    ...hazardNotes(input, q),
  ];
  const ORDER: readonly Severity[] = ['cannotBeBuilt', 'addsWork', 'information'];
  return ORDER.flatMap((severity) => drafts.filter((draft) => draft.severity === severity)).map(
    ({ wayOut, ...note }): FitNote => {
      if (!wayOut) return note;
      const choices = wayOut.changes.reduce(applyChange, input.choices);
      const after = sumOf(
        lineDrafts(quantities(input.survey, input.edition, choices), input.survey, input.edition),
        input.terms,
      );
      return { ...note, wayOut: { ...wayOut, delta: cents(after.total - total) } };
    },
  );
}

/** Where a change of a key belongs: a zone that may differ, else the whole kitchen. */
function changeFor(
  { edition, choices }: EngineInput,
  key: 'overlay' | 'crown' | 'base' | 'lightRail' | 'style',
  zone: Zone,
  option: string,
): ChoiceChange {
  const own = choices.zones[zone]?.[key] !== undefined;
  return { key, zone: own && edition.zonedKeys.includes(key) ? zone : 'kitchen', option };
}

const inZone = (q: Quantities, zone: Zone) => q.measures.filter((one) => one.face.cabinet.zone === zone);

// ------------------------------------------------------------------ the survey (A2, S1, S2, S4)

function surveyNotes({ survey, edition }: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  for (const face of q.faces) {
    const { cabinet } = face;
    if (!face.renewed) continue;
    for (const open of openSums(face)) {
      const by = open.sum - open.should;
      const where = open.along === 'row' ? 'across' : 'from top to bottom';
      notes.push({
        code: open.along === 'row' ? 'survey.row' : 'survey.column',
        rule: 'S1',
        severity: 'cannotBeBuilt',
        zone: cabinet.zone,
        parts: open.openings.map((n) => `${cabinet.id}-${n}`),
        homeowner: `Cabinet ${cabinet.id} was measured so that its parts do not add up. It is measured again before anything is ordered.`,
        bench: `${cabinet.id}${open.leg ? `, leg ${open.leg}` : ''}: ${where}, ${list(open.openings.map((n) => `opening ${n}`))} and members come to ${inch(open.sum)}, the frame is ${inch(open.should)}: ${inch(Math.abs(by))} too ${by > 0 ? 'much' : 'little'}.`,
      });
    }
  }
  for (const fault of planFaults(survey, q.faces, edition.shop.panelThickness)) {
    const cabinet = survey.cabinets.find((one) => fault.ids.some((id) => id === one.id));
    const bench = {
      overlap: `On wall ${fault.wall}, ${fault.ids.join(' and ')} overlap by ${inch(fault.by)}.`,
      wall: `${fault.ids[0]} reaches ${inch(fault.by)} past the end of wall ${fault.wall}.`,
      ceiling: `${fault.ids[0]} reaches ${inch(fault.by)} above the ceiling or soffit.`,
      room: `${fault.ids[0]} stands ${inch(fault.by)} outside the room’s outline.`,
    }[fault.kind];
    notes.push({
      code: `survey.${fault.kind}`,
      rule: 'S2',
      severity: 'cannotBeBuilt',
      zone: cabinet?.zone ?? 'kitchen',
      parts: fault.ids,
      homeowner: `The measures of ${list(fault.ids)} do not fit the room. They are taken again before anything is ordered.`,
      bench,
    });
  }
  for (const zone of ZONES) {
    const cabinets = survey.cabinets.filter((one) => one.zone === zone && one.action === 'reface');
    const failed = cabinets.filter((one) => one.bondTest === 'failed').map((one) => one.id);
    if (failed.length > 0)
      notes.push({
        code: 'bond.failed',
        rule: 'A2',
        severity: 'cannotBeBuilt',
        zone,
        parts: failed,
        homeowner: `Veneer does not hold on ${marks(failed)} as they are. They need other treatment or new cabinets.`,
        bench: `Bond test failed on ${marks(failed)}: strip to sound wood and test again, or replace.`,
      });
    const untested = cabinets.filter((one) => one.bondTest === 'notDone').map((one) => one.id);
    if (untested.length > 0)
      notes.push({
        code: 'bond.notDone',
        rule: 'A2',
        severity: 'information',
        zone,
        parts: untested,
        homeowner: 'A bond test is still to be made on some cabinets before the work.',
        bench: `Bond test to be made: ${marks(untested)}.`,
      });
    for (const [condition, unit, what] of [
      ['damagedFloor', 'each', 'floor'],
      ['damagedFrame', 'foot', 'frame'],
    ] as const) {
      const hurt = cabinets.filter((one) => one.condition === condition);
      if (hurt.length === 0) continue;
      const rate = edition.hiddenDamage.find((one) => one.unit === unit);
      const quantity =
        unit === 'each'
          ? hurt.length
          : hurt.reduce((sum, one) => sum + 2 * (one.width + one.height), 0) / 768;
      notes.push({
        code: `condition.${what}`,
        rule: 'M10',
        severity: 'addsWork',
        zone,
        parts: hurt.map((one) => one.id),
        homeowner: `The ${what} of ${marks(hurt.map((one) => one.id))} is damaged and is renewed.`,
        bench: `Renew the ${what} of ${marks(hurt.map((one) => one.id))} before veneer${rate ? `, at ${formatCents(rate.price)} ${unit === 'each' ? 'each' : 'a foot'}` : ''}.`,
        ...(rate ? { amount: cents(Math.round(quantity * rate.price)) } : {}),
      });
    }
  }
  return notes;
}

// ------------------------------------------------------------------ what goes together (X1)

function choiceNotes({ survey, edition, choices }: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  for (const zone of ZONES) {
    if (!survey.cabinets.some((one) => one.zone === zone)) continue;
    const found = clash(edition, chosenIn(choices, zone));
    if (!found) continue;
    notes.push({
      code: 'choices.clash',
      rule: 'X1',
      severity: 'cannotBeBuilt',
      zone,
      parts: [],
      homeowner: found.reason,
      bench: found.reason,
    });
  }
  for (const face of q.faces) {
    const other = face.right.kind === 'face' ? q.faces[face.right.face] : undefined;
    if (!face.renewed || !other?.renewed) continue;
    const a = q.made[face.cabinet.zone].overlay;
    const b = q.made[other.cabinet.zone].overlay;
    if (a.amount === b.amount) continue;
    notes.push({
      code: 'overlay.mixed',
      rule: 'O3',
      severity: 'information',
      zone: 'kitchen',
      parts: [face.cabinet.id, other.cabinet.id],
      homeowner: `Two overlays meet between ${face.cabinet.id} and ${other.cabinet.id}: the frame shows unevenly there.`,
      bench: `${face.cabinet.id} (${inch(a.amount)}) and ${other.cabinet.id} (${inch(b.amount)}) meet on one pair of stiles.`,
    });
  }
  return notes;
}

// ------------------------------------------------------------------ fronts (O4, S4, H1, H2, O7)

function frontNotes({ edition }: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  for (const zone of ZONES) {
    const { style, species, hingeSet } = q.made[zone];
    const fronts = inZone(q, zone).flatMap((one) => one.openings.flatMap((opening) => opening.fronts));
    const push = (
      code: string,
      rule: string,
      severity: Severity,
      parts: readonly string[],
      homeowner: string,
      bench: string,
    ) => {
      if (parts.length > 0) notes.push({ code, rule, severity, zone, parts, homeowner, bench });
    };

    const flat = fronts.filter((one) => one.madeFlat).map((one) => one.mark);
    push(
      'front.slab',
      'O4',
      'information',
      flat,
      `${count(flat.length, 'front')} of ${ZONE_NAMES[zone]} ${flat.length === 1 ? 'is' : 'are'} too small for a frame and panel and ${flat.length === 1 ? 'is' : 'are'} made flat.`,
      `Slab, too small for five pieces of ${style.name.toLowerCase()}: ${marks(flat)}.`,
    );
    const wide = fronts.filter((one) => one.kind === 'door' && one.width > style.widestLeaf);
    push(
      'front.wide',
      'S4',
      'information',
      wide.map((one) => one.mark),
      `${count(wide.length, 'door')} would be wider than ${style.name.toLowerCase()} is usually made. A pair may be better.`,
      `Wider than ${inch(style.widestLeaf)}: ${marks(wide.map((one) => `${one.mark} (${inch(one.width)})`))}.`,
    );
    const past = fronts.filter((one) => one.hingeFault === 'chart');
    push(
      'hinge.chart',
      'H1',
      'cannotBeBuilt',
      past.map((one) => one.mark),
      `${count(past.length, 'door')} of ${ZONE_NAMES[zone]} ${past.length === 1 ? 'is' : 'are'} too tall or too heavy for these hinges.`,
      `Past the last row of the chart of ${hingeSet.name}: ${marks(past.map((one) => `${one.mark} (${inch(one.height)}, ${(one.weight / 1000).toFixed(1)} lb)`))}.`,
    );
    const noJoint = fronts.filter((one) => one.hingeFault === 'noJoint').map((one) => one.mark);
    push(
      'hinge.noJoint',
      'H2',
      'cannotBeBuilt',
      noJoint,
      'The corner doors cannot fold with these hinges.',
      `${hingeSet.name} has no joint hinges for ${marks(noJoint)}.`,
    );
    const low = fronts.filter((one) => one.height < style.smallestHeight);
    push(
      'front.low',
      'C3',
      'cannotBeBuilt',
      low.map((one) => one.mark),
      `${count(low.length, 'front')} would be too low to make.`,
      `Lower than ${inch(style.smallestHeight)}: ${marks(low.map((one) => `${one.mark} (${inch(one.height)})`))}.`,
    );
    if (style.solidPanel && species.tangential > 0) {
      const { from, to } = edition.shop.moisture;
      const play = style.panelPlay ?? style.groove;
      const moving = fronts.filter(
        (one) =>
          one.build === 'fivePiece' &&
          !one.glass &&
          panelMovement(panelWidth(one.width, style.stile, style.groove), species.tangential, from, to) >
            play,
      );
      push(
        'panel.movement',
        'O7',
        'cannotBeBuilt',
        moving.map((one) => one.mark),
        `The panels of ${count(moving.length, 'front')} would swell more than their frames allow.`,
        `From ${from} to ${to} % the panel grows by more than ${inch(play)}: ${marks(moving.map((one) => one.mark))}.`,
      );
    }
  }
  return notes;
}

// ------------------------------------------------------------------ reveals (O3)

function revealNotes(input: EngineInput, q: Quantities): Draft[] {
  const faults = revealFaults(q);
  return ZONES.flatMap((zone): Draft[] => {
    const here = faults.filter((fault) => fault.zone === zone);
    const [first] = here;
    if (!first) return [];
    const worst = here.reduce((least, one) => (one.reveal < least.reveal ? one : least), first);
    const largest = Math.min(...here.map((one) => one.largest));
    const { overlay } = q.made[zone];
    const fits = (one: Overlay) => one.amount <= largest;
    const [better] = input.edition.overlays.filter(fits).sort((a, b) => b.amount - a.amount);
    const parts = [...new Set(here.flatMap((one) => one.marks))];
    return [
      {
        code: 'reveal.small',
        rule: 'O3',
        severity: 'cannotBeBuilt',
        zone,
        parts,
        homeowner: `With ${overlay.name.toLowerCase()} the fronts of ${ZONE_NAMES[zone]} come too close to each other.`,
        bench: `Reveal ${worst.reveal < 0 ? `short by ${inch(-worst.reveal)}` : inch(worst.reveal)} at ${worst.marks.join(' and ')} (${worst.where}), needed ${inch(worst.needed)}; ${count(here.length, 'place')} in all. The largest overlay that can be built is ${inch(largest)}.`,
        wayOut: better && {
          label: `Take ${better.name.toLowerCase()}`,
          changes: [changeFor(input, 'overlay', zone, better.id)],
        },
      },
    ];
  });
}

// ------------------------------------------------------------------ crown (C2, C3)

function crownNotes(input: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  const { survey, edition } = input;
  const strip = edition.labour.find((rate) => rate.per === 'fillerStrip');
  for (const zone of ZONES) {
    const { crown } = q.made[zone];
    if (!crown) continue;
    const measures = inZone(q, zone).filter((one) => one.crown !== null);
    const filled = measures.flatMap((one) =>
      one.openings.filter((opening) => opening.crownFiller > 0).map((opening) => ({ one, opening })),
    );
    if (filled.length > 0) {
      const heights = [...new Set(filled.map(({ opening }) => opening.crownFiller))].sort((a, b) => a - b);
      const fronts = filled.reduce((sum, { opening }) => sum + opening.fronts.length, 0);
      const high = heights.map(inch).join(' or ');
      const easier = easierCrown(input, q, zone);
      notes.push({
        code: 'crown.filler',
        rule: 'C3',
        severity: 'addsWork',
        zone,
        parts: [...new Set(filled.map(({ opening }) => opening.mark))],
        homeowner: `${crown.name} needs more height than these cabinets leave, so ${count(filled.length, 'filler strip')} ${high} high ${filled.length === 1 ? 'is' : 'are'} set in and ${count(fronts, 'front')} ${fronts === 1 ? 'is' : 'are'} made shorter by as much.`,
        bench: `Filler strips ${high} under the top rail, veneered with it as one strip: ${marks(filled.map(({ opening, one }) => `${opening.mark} (seat ${inch(one.crown?.seat ?? 0)})`))}.`,
        ...(strip ? { amount: cents(filled.length * strip.price) } : {}),
        wayOut: easier && {
          label: easier.id === 'none' ? 'Leave the crown out' : `Take ${easier.name.toLowerCase()}`,
          changes: [changeFor(input, 'crown', zone, easier.id)],
        },
      });
    }
    const nailers = measures.filter((one) => one.crown?.nailer).map((one) => one.face.cabinet.id);
    if (nailers.length > 0)
      notes.push({
        code: 'crown.nailer',
        rule: 'C3',
        severity: 'information',
        zone,
        parts: [...new Set(nailers)],
        homeowner: 'The crown stands on a strip above the cabinets; the doors keep their height.',
        bench: `Nailer above ${marks([...new Set(nailers)])}, lap ${inch(edition.shop.nailerLap)}.`,
      });
    const soffits = measures.filter(
      ({ face, crown: fit }) =>
        fit !== null &&
        survey.room.soffits.some(
          (soffit) =>
            soffit.wall === face.wall.id &&
            soffit.at < endOf(face) &&
            soffit.at + soffit.width > face.at &&
            fit.room < fit.drop + 64 &&
            soffit.depth < face.cabinet.depth + projectionOf(crown),
        ),
    );
    if (soffits.length > 0)
      notes.push({
        code: 'crown.soffit',
        rule: 'C3',
        severity: 'information',
        zone,
        parts: soffits.map(({ face }) => face.cabinet.id),
        homeowner: 'The crown stands out past the soffit above it.',
        bench: `${crown.name} projects past the soffit at ${marks(soffits.map(({ face }) => face.cabinet.id))}.`,
      });
    notes.push(...unevenNotes(q, zone));
  }
  notes.push(...casingNotes(input, q));
  return notes;
}

/** The tallest crown of the edition that needs no filler in a zone, else none. */
function easierCrown(
  { edition }: EngineInput,
  q: Quantities,
  zone: Zone,
): { readonly id: string; readonly name: string } | undefined {
  const now = q.made[zone].crown;
  const clearance = edition.shop.crownClearance;
  const faces = inZone(q, zone).filter((one) => one.crown !== null);
  const fits = (crown: MouldingProfile) => {
    const drop = Math.ceil(crown.face * Math.cos((crown.spring / 1000 / 180) * Math.PI));
    return faces.every(({ crown: fit }) => {
      if (!fit) return true;
      const seat = fit.room >= drop ? 0 : drop - Math.max(0, fit.room);
      return seat === 0 || seat + clearance <= fit.freeFlat;
    });
  };
  const [best] = edition.crowns
    .filter((crown) => crown.id !== now?.id && fits(crown))
    .sort((a, b) => b.face - a.face);
  return best ?? { id: 'none', name: 'None' };
}

/** Neighbours whose fronts stood in one line and no longer do (C3). */
function unevenNotes(q: Quantities, zone: Zone): Draft[] {
  const uneven = new Set<string>();
  for (const measure of inZone(q, zone)) {
    const { face } = measure;
    const other = face.right.kind === 'face' ? q.measures[face.right.face] : undefined;
    if (!other?.crown || !measure.crown || other.face.cabinet.zone !== zone) continue;
    const tops = (of: typeof measure) =>
      of.openings
        .filter((opening) => opening.placed.underTopRail && opening.fronts.length > 0)
        .map((opening) => ({
          before: of.face.cabinet.bottom + opening.placed.y + opening.placed.height,
          filler: opening.crownFiller,
          mark: opening.mark,
        }));
    for (const a of tops(measure))
      for (const b of tops(other))
        if (Math.abs(a.before - b.before) <= 4 && Math.abs(a.filler - b.filler) > 4) {
          uneven.add(a.mark);
          uneven.add(b.mark);
        }
  }
  if (uneven.size === 0) return [];
  const parts = [...uneven];
  return [
    {
      code: 'crown.uneven',
      rule: 'C3',
      severity: 'information',
      zone,
      parts,
      homeowner: 'With this crown some doors that stood in one line no longer do.',
      bench: `Top edges no longer line up: ${marks(parts)}.`,
    },
  ];
}

/** Returns of the crown that run into a window's or doorway's casing. */
function casingNotes({ survey }: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  for (const line of q.mouldings.crown.lines) {
    const reach = projectionOf(line.profile);
    const fit = q.measures[line.faces[0]?.index ?? -1]?.crown;
    const lower = line.level - (fit?.seat ?? 0);
    const upper = lower + (fit?.drop ?? 0);
    for (const stretch of line.stretches) {
      if (stretch.role !== 'return') continue;
      const { at } = placeOn(stretch.wall, stretch.from);
      for (const gap of survey.gaps) {
        if (gap.wall !== stretch.wall.id) continue;
        const from = gap.at - gap.casing;
        const to = gap.at + gap.width + gap.casing;
        const high = gap.bottom + gap.height + gap.casing;
        const beside = at + reach > from && at - reach < to;
        if (!beside || high <= lower || gap.bottom - gap.casing >= upper) continue;
        notes.push({
          code: 'crown.casing',
          rule: 'C2',
          severity: 'information',
          zone: line.zone,
          parts: [stretch.face.cabinet.id, gap.id],
          homeowner: `The end of the crown meets the casing of the ${gap.kind} and is fitted to it.`,
          bench: `Return at ${stretch.face.cabinet.id} projects ${inch(reach)} and meets the casing of ${gap.id}: cope or cut back.`,
        });
      }
    }
  }
  return notes;
}

// ------------------------------------------------------------------ under the wall cabinets (C4)

function underNotes({ edition }: EngineInput, q: Quantities): Draft[] {
  const strip = edition.labour.find((rate) => rate.per === 'fillerStrip');
  return ZONES.flatMap((zone): Draft[] => {
    const here = inZone(q, zone).filter((one) => one.valance > 0);
    if (here.length === 0) return [];
    const parts = here.map((one) => one.face.cabinet.id);
    const heights = [...new Set(here.map((one) => one.valance))].map(inch).join(' or ');
    return [
      {
        code: 'valance.filler',
        rule: 'C4',
        severity: 'addsWork',
        zone,
        parts,
        homeowner: `A strip ${heights} high hides the lights under ${count(parts.length, 'wall cabinet')}.`,
        bench: `Bottom strips ${heights} at ${marks(parts)}.`,
        ...(strip ? { amount: cents(parts.length * strip.price) } : {}),
      },
    ];
  });
}

// ------------------------------------------------------------------ base moulding (C5)

function baseNotes(input: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  const { survey, edition } = input;
  const strip = edition.labour.find((rate) => rate.per === 'fillerStrip');
  for (const zone of ZONES) {
    const { base } = q.made[zone];
    if (!base) continue;
    const measures = inZone(q, zone).filter((one) => one.face.cabinet.tier !== 'wall' && one.face.renewed);
    const filled = measures.flatMap((one) => one.openings.filter((opening) => opening.baseFiller > 0));
    if (filled.length > 0) {
      const heights = [...new Set(filled.map((opening) => opening.baseFiller))].map(inch).join(' or ');
      const lowest = Math.min(
        ...measures.map(
          ({ face }) => face.cabinet.bottom + face.frame.railBottom - q.made[zone].overlay.amount,
        ),
      );
      const [lower] = edition.bases
        .filter((one) => one.height + edition.shop.baseClearance <= lowest)
        .sort((a, b) => b.height - a.height);
      notes.push({
        code: 'base.filler',
        rule: 'C5',
        severity: 'addsWork',
        zone,
        parts: filled.map((opening) => opening.mark),
        homeowner: `${base.name} would stand in the way of ${count(filled.length, 'front')}, so strips ${heights} high are set in below and the fronts are made shorter.`,
        bench: `Filler strips ${heights} on the bottom rail: ${marks(filled.map((opening) => opening.mark))}.`,
        ...(strip ? { amount: cents(filled.length * strip.price) } : {}),
        wayOut: lower
          ? {
              label: `Take ${lower.name.toLowerCase()}`,
              changes: [changeFor(input, 'base', zone, lower.id)],
            }
          : { label: 'Leave the base moulding out', changes: [changeFor(input, 'base', zone, 'none')] },
      });
    }
    const toes = measures.filter((one) => one.face.cabinet.toe !== undefined);
    if (toes.length > 0)
      notes.push({
        code: 'base.toe',
        rule: 'C5',
        severity: 'information',
        zone,
        parts: [...new Set(toes.map((one) => one.face.cabinet.id))],
        homeowner:
          'The base moulding closes the toe space: there is no room for toes under the cabinets any more.',
        bench: `${base.name} on the face of the frames; toe space ${inch(toes[0]?.face.cabinet.toe?.depth ?? 0)} deep is lost.`,
      });
    const walls = new Set(measures.map((one) => one.face.wall.id));
    const low = survey.appliances.filter(
      (one) => one.toeDoor !== undefined && walls.has(one.wall) && base.height > one.toeDoor,
    );
    if (low.length > 0)
      notes.push({
        code: 'base.appliance',
        rule: 'C5',
        severity: 'information',
        zone,
        parts: low.map((one) => one.id),
        homeowner: `The base moulding stops beside the ${list(low.map((one) => one.kind))}, whose lower door must stay free.`,
        bench: `Stop ${inch(base.height)} base square at ${marks(low.map((one) => one.id))}; toe doors begin below its edge.`,
      });
  }
  return notes;
}

// ------------------------------------------------------------------ doors that strike (O6)

function doorNotes({ survey, edition }: EngineInput, q: Quantities): Draft[] {
  const all = strikes(survey, q, edition);
  return ZONES.flatMap((zone): Draft[] => {
    const here = all.filter((one) => one.zone === zone);
    if (here.length === 0) return [];
    const worst = here.reduce((least, one) => (one.angle < least.angle ? one : least));
    return [
      {
        code: 'door.strike',
        rule: 'O6',
        severity: 'information',
        zone,
        parts: here.map((one) => one.mark),
        homeowner: `${count(here.length, 'door')} of ${ZONE_NAMES[zone]} cannot open all the way; the least, ${worst.mark}, opens to ${worst.angle}° before it meets ${worst.what}.`,
        bench: `Stops or restrictors: ${marks(here.map((one) => `${one.mark} at ${one.angle}° against ${one.what}`))}.`,
      },
    ];
  });
}

// ------------------------------------------------------------------ drawers and pull-outs (B2, B3)

function boxNotes(_input: EngineInput, q: Quantities): Draft[] {
  return q.boxes.faults.map((fault): Draft => {
    const zone = fault.measure.face.cabinet.zone;
    const { mark } = fault.opening;
    const out = { label: 'Leave it out', changes: [{ inside: mark, option: null }] };
    const shared = { zone, parts: [mark] };
    switch (fault.code) {
      case 'pullOut.none':
        return {
          ...shared,
          code: 'pullOut.none',
          rule: 'B3',
          severity: 'cannotBeBuilt',
          homeowner: `What was chosen for the inside of ${mark} does not fit behind its frame and hinges.`,
          bench: `${mark}: opening ${inch(fault.opening.placed.width)} less hinges and slides leaves too little.`,
          wayOut: out,
        };
      case 'pullOut.wrongOpening':
        return {
          ...shared,
          code: 'pullOut.wrongOpening',
          rule: 'X1',
          severity: 'cannotBeBuilt',
          homeowner: `What was chosen for the inside of ${mark} does not go into this kind of opening.`,
          bench: `${mark} is a ${fault.opening.placed.opening.kind}; the storage is not made for it.`,
          wayOut: out,
        };
      case 'box.noDepth':
        return {
          ...shared,
          code: 'box.noDepth',
          rule: 'B2',
          severity: 'cannotBeBuilt',
          homeowner: `A new box does not fit into ${mark}.`,
          bench: `${fault.mark}: no slide from 12 in fits, or nothing is left of the box.`,
        };
      case 'slide.load':
        return {
          ...shared,
          code: 'slide.load',
          rule: 'B2',
          severity: 'information',
          homeowner: `The drawer ${mark} is so large that, filled, it may be too heavy for its slides.`,
          bench: `${fault.mark}: ${fault.load ?? 0} lb by volume, slide rated ${fault.rated ?? 0} lb.`,
        };
    }
  });
}

// ------------------------------------------------------------------ veneer (V1, V2)

function veneerNotes({ edition }: EngineInput, q: Quantities): Draft[] {
  const notes: Draft[] = [];
  const { sheet } = edition.shop;
  const strips = veneerStrips(q.faces, q.measures, q.made, edition);
  for (const zone of ZONES) {
    const wide = strips.filter(
      (one) => one.zone === zone && (one.width > sheet.width || one.length > sheet.height),
    );
    if (wide.length > 0)
      notes.push({
        code: 'veneer.wide',
        rule: 'V2',
        severity: 'information',
        zone,
        parts: wide.map((one) => one.mark),
        homeowner: 'Some veneer strips are longer than a sheet and are joined.',
        bench: `Larger than ${inch(sheet.width)} × ${inch(sheet.height)}: ${marks(wide.map((one) => one.mark))}.`,
      });
    const loose = q.faces.filter((face): boolean => {
      const other = face.right.kind === 'face' ? q.faces[face.right.face] : undefined;
      return (
        face.cabinet.zone === zone &&
        other !== undefined &&
        other.cabinet.id !== face.cabinet.id &&
        face.cabinet.joinedRight === false &&
        sharesStrip(face, other, q.made)
      );
    });
    if (loose.length > 0)
      notes.push({
        code: 'veneer.join',
        rule: 'V1',
        severity: 'information',
        zone,
        parts: loose.map((face) => face.cabinet.id),
        homeowner: 'Some boxes are screwed to their neighbours before one strip covers both.',
        bench: `Screw to the right neighbour before veneer: ${marks(loose.map((face) => face.cabinet.id))}.`,
      });
  }
  return notes;
}

// ------------------------------------------------------------------ what can hurt someone (L5, L6)

function hazardNotes({ survey }: EngineInput, q: Quantities): Draft[] {
  if (!FEDERAL) return [];
  const notes: Draft[] = [];
  const lead = leadReading(survey, q.faces, FEDERAL.lead);
  if (lead.overLimit)
    notes.push({
      code: 'lead.area',
      rule: 'L5',
      severity: 'information',
      zone: 'kitchen',
      parts: [],
      homeowner: `${survey.yearBuilt === null ? 'The year of building is not known' : `The house is of ${survey.yearBuilt}`}, and ${(lead.area / 100).toFixed(2)} ft² of painted or varnished surface is disturbed: the lead-safe rules apply, and you acknowledge the pamphlet before the work. (${FEDERAL.lead.source}; not legal advice.)`,
      bench: `Lead-safe work by a certified renovator: ${(lead.area / 100).toFixed(2)} ft² disturbed, limit ${(FEDERAL.lead.limit / 100).toFixed(2)} ft² in one room.`,
    });
  for (const reading of rangeReadings(survey, q.faces, FEDERAL.range)) {
    const cabinet = survey.cabinets.find((one) => one.id === reading.cabinet);
    notes.push({
      code: 'range.clearance',
      rule: 'L6',
      severity: 'information',
      zone: cabinet?.zone ?? 'kitchen',
      parts: [reading.cabinet, reading.range],
      homeowner: `The cabinet over the range is ${inch(reading.clear)} above it; ${inch(reading.needed)} is asked for. The appliance’s listing and the local code decide. (Not legal advice.)`,
      bench: `${reading.cabinet}: ${inch(reading.clear)} above ${reading.range}, ${reading.guarded ? 'guarded' : 'unguarded'}, ${inch(reading.needed)} asked for (${FEDERAL.range.source}).`,
    });
  }
  return notes;
}
