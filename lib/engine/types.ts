/**
 * The shapes of the computation. Lengths are integers of 1/64 inch, money integer cents, rates parts per million.
 * Plan coordinates: x to the east, y to the north, seen from above; z is height above the floor.
 */

declare const lengthBrand: unique symbol;
declare const moneyBrand: unique symbol;

/** An integer count of 1/64 inch (rule D1). */
export type Sixtyfourths = number & { readonly [lengthBrand]: true };
/** An integer count of cents. */
export type Cents = number & { readonly [moneyBrand]: true };
/** `YYYY-MM-DD`. */
export type CalendarDate = string;

export interface PlanPoint {
  readonly x: Sixtyfourths;
  readonly y: Sixtyfourths;
}

export const ZONES = ['wall', 'base', 'island', 'tall'] as const;
/** Where a choice may differ. `island` also covers a peninsula. */
export type Zone = (typeof ZONES)[number];
/** `kitchen` is the default of all zones. */
export type ZoneOrKitchen = Zone | 'kitchen';

// ---------------------------------------------------------------- survey

/** A wall, or the back line of a free-standing run. Seen from its front, `from` is the left end, `to` the right. */
export interface Wall {
  /** The first part of every mark on it, such as `N`. */
  readonly id: string;
  readonly name: string;
  readonly kind: 'wall' | 'freestanding';
  readonly from: PlanPoint;
  readonly to: PlanPoint;
}

export type OpeningKind =
  'door' | 'pair' | 'drawer' | 'falseFront' | 'tiltOut' | 'appliancePanel' | 'open' | 'cornerFold';

/** One opening of a face frame; its mark is `<cabinet>-<n>`, such as `N-03-2` (rule A1). */
export interface Opening {
  readonly n: number;
  readonly kind: OpeningKind;
  readonly width: Sixtyfourths;
  /** The second reading of the width when out of square; the narrower rules (S4). */
  readonly widthSecond?: Sixtyfourths;
  readonly height: Sixtyfourths;
  /** Hinge side as seen from the front; for a folding corner pair the hung side. */
  readonly hinge?: 'left' | 'right';
  /** Ordered without a panel, finished inside. */
  readonly glass?: boolean;
  /** From the appliance's own sheet; rules over the opening for an appliance panel. */
  readonly applianceSize?: { readonly width: Sixtyfourths; readonly height: Sixtyfourths };
  /** The fronts that hang there now (L5). */
  readonly existing: readonly { readonly width: Sixtyfourths; readonly height: Sixtyfourths }[];
}

/** A frame's clear inside, divided: `row` stands openings side by side, `column` stacks them from the top down. */
export type FrameLayout =
  | { readonly opening: Opening }
  | {
      readonly split: 'row' | 'column';
      readonly parts: readonly FrameLayout[];
      /** Mullions (row) or rails (column) between the parts; one fewer than parts. */
      readonly members: readonly Sixtyfourths[];
    };

export interface FaceFrame {
  readonly stileLeft: Sixtyfourths;
  readonly stileRight: Sixtyfourths;
  readonly railTop: Sixtyfourths;
  readonly railBottom: Sixtyfourths;
  readonly thickness: Sixtyfourths;
  readonly layout: FrameLayout;
}

export interface CabinetEnd {
  /** Seen from the room; gets a panel and widens the stile's strip. */
  readonly exposed: boolean;
}

export interface Cabinet {
  /** `<wall>-<nn>`; kept across survey versions. */
  readonly id: string;
  readonly wall: string;
  readonly zone: Zone;
  readonly tier: 'base' | 'wall' | 'tall';
  /** From the wall's left end to the frame's left edge. */
  readonly at: Sixtyfourths;
  readonly width: Sixtyfourths;
  /** Height of the frame, toe space excluded. */
  readonly height: Sixtyfourths;
  /** Of the frame's lower edge above the floor. */
  readonly bottom: Sixtyfourths;
  /** Frame included, door not. */
  readonly depth: Sixtyfourths;
  readonly frame: FaceFrame;
  readonly left: CabinetEnd;
  readonly right: CabinetEnd;
  /** Back seen from the room (islands and peninsulas). */
  readonly backExposed?: boolean;
  readonly toe?: { readonly height: Sixtyfourths; readonly depth: Sixtyfourths };
  readonly box: 'faceFrame';
  readonly action: 'reface' | 'replace' | 'remove' | 'add' | 'keep';
  readonly material: 'wood' | 'laminate' | 'thermofoil' | 'paint';
  readonly bondTest: 'passed' | 'failed' | 'notDone';
  readonly condition: 'sound' | 'damagedFloor' | 'damagedFrame';
  /** Painted or varnished now (L5). */
  readonly coated: boolean;
  /** A corner cabinet: leg A along `wall`, leg B along `otherWall`; `frame` is leg A's, `frameB` leg B's. */
  readonly corner?: {
    readonly otherWall: string;
    readonly legA: Sixtyfourths;
    readonly legB: Sixtyfourths;
    readonly frameB: FaceFrame;
  };
  /** Screws join this box to its right neighbour (before one strip bridges the stiles). */
  readonly joinedRight?: boolean;
  /** How far the frame's face stands out of its neighbours' plane. */
  readonly outOfPlane?: Sixtyfourths;
  /** How far the frame reaches past the box's sides, behind which end panels and spacers are packed out (P1, B3). */
  readonly overhang?: Sixtyfourths;
  /** A light fixture under it, and the lip that hides part of it now (C4). */
  readonly underLight?: { readonly height: Sixtyfourths; readonly lip: Sixtyfourths };
}

export type ApplianceKind =
  'range' | 'cooktop' | 'refrigerator' | 'dishwasher' | 'sink' | 'hood' | 'microwave' | 'wallOven';

export interface Appliance {
  readonly id: string;
  readonly kind: ApplianceKind;
  readonly wall: string;
  readonly at: Sixtyfourths;
  readonly width: Sixtyfourths;
  readonly bottom: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly depth: Sixtyfourths;
  /** Sits inside a cabinet (a sink, a cooktop) and takes no wall length. */
  readonly within?: string;
  /** How far its handle stands out of its front (O6). */
  readonly handle?: Sixtyfourths;
  /** Height of the door at its toe, which a base moulding must leave free (C5). */
  readonly toeDoor?: Sixtyfourths;
}

/** A window or a doorway in a wall. */
export interface WallGap {
  readonly id: string;
  readonly kind: 'window' | 'doorway';
  readonly wall: string;
  readonly at: Sixtyfourths;
  readonly width: Sixtyfourths;
  readonly bottom: Sixtyfourths;
  readonly height: Sixtyfourths;
  /** Width of the casing round it. */
  readonly casing: Sixtyfourths;
}

/** A flush or proud filler between cabinets, or between a cabinet and a wall. */
export interface Filler {
  readonly id: string;
  readonly wall: string;
  readonly tier: 'base' | 'wall' | 'tall';
  readonly at: Sixtyfourths;
  readonly width: Sixtyfourths;
  readonly bottom: Sixtyfourths;
  readonly height: Sixtyfourths;
}

export interface Survey {
  readonly version: 1;
  readonly kitchen: string;
  readonly measuredOn: CalendarDate;
  /** `null`: not known, counted as before 1978 (L5). */
  readonly yearBuilt: number | null;
  readonly room: {
    /** Counter-clockwise seen from above. */
    readonly outline: readonly PlanPoint[];
    readonly ceiling: Sixtyfourths;
    /** A lowered ceiling over a stretch of wall. */
    readonly soffits: readonly {
      readonly wall: string;
      readonly at: Sixtyfourths;
      readonly width: Sixtyfourths;
      readonly depth: Sixtyfourths;
      readonly bottom: Sixtyfourths;
    }[];
  };
  /** In plan order; a corner cabinet takes leg A of the first of its two walls. */
  readonly walls: readonly Wall[];
  readonly cabinets: readonly Cabinet[];
  readonly fillers: readonly Filler[];
  readonly appliances: readonly Appliance[];
  readonly gaps: readonly WallGap[];
  /** Lengths as they were typed, by path, such as `cabinets.N-03.width`: `24 1/2`. */
  readonly typed: Readonly<Record<string, string>>;
}

// ---------------------------------------------------------------- choices

export const CHOICE_KEYS = [
  'style',
  'species',
  'finish',
  'overlay',
  'pull',
  'crown',
  'base',
  'lightRail',
  'ends',
  'drawerBox',
  'counter',
] as const;
export type ChoiceKey = (typeof CHOICE_KEYS)[number];
/** Option ids by key; `none` is an ordinary option id where a thing may be left out. */
export type ZoneChoices = Readonly<Record<ChoiceKey, string>>;

export interface Choices {
  readonly version: 1;
  readonly kitchen: ZoneChoices;
  readonly zones: Readonly<Partial<Record<Zone, Partial<ZoneChoices>>>>;
  /** Storage put inside an opening, by part mark. */
  readonly inside: Readonly<Record<string, string>>;
}

/** One step of choosing; what a delta is computed for and what a history records. */
export type ChoiceChange =
  | { readonly key: ChoiceKey; readonly zone: ZoneOrKitchen; readonly option: string }
  | { readonly inside: string; readonly option: string | null };

// ---------------------------------------------------------------- results

export type Unit = 'each' | 'squareFoot' | 'foot' | 'sheet' | 'hour' | 'lump';
export type LineClass = 'material' | 'labour' | 'other';

export interface PriceLine {
  /** Stable within a takeoff, such as `fronts.wall`. */
  readonly code: string;
  readonly label: string;
  readonly zone: ZoneOrKitchen;
  readonly class: LineClass;
  readonly unit: Unit;
  /** In the unit's least step: 0.01 ft², 1/64 in for feet, 1 each, 0.01 hour. */
  readonly quantity: number;
  /** The quantity as it is printed, such as `74.31 ft²`. */
  readonly quantityText: string;
  readonly unitPrice: Cents;
  readonly amount: Cents;
  /** Marks of the parts it pays for. */
  readonly parts: readonly string[];
  /** Why it is so much, in one sentence. */
  readonly because: string;
  /** Id of the option or labour rate that it pays for. */
  readonly option?: string;
}

export type Severity = 'information' | 'addsWork' | 'cannotBeBuilt';

export interface FitNote {
  /** Such as `crown.filler`. */
  readonly code: string;
  readonly rule: string;
  readonly severity: Severity;
  readonly zone: ZoneOrKitchen;
  readonly parts: readonly string[];
  readonly homeowner: string;
  readonly bench: string;
  /** What the note adds to the price, when it adds work. */
  readonly amount?: Cents;
  /** Changes that would clear it. */
  readonly wayOut?: {
    readonly label: string;
    readonly changes: readonly ChoiceChange[];
    /** Total after it less the total now. */
    readonly delta?: Cents;
  };
}

export type Availability = 'available' | 'availableWithSwap' | 'notAvailable';

/** One option of a choice as it stands now. */
export interface OptionState {
  readonly id: string;
  readonly name: string;
  readonly chosen: boolean;
  readonly availability: Availability;
  /** Total with it (after its swaps) less the total now (M5); `null` when not available. */
  readonly delta: Cents | null;
  readonly swaps: readonly ChoiceChange[];
  /** A sentence: what is swapped, or why it is not available. */
  readonly reason?: string;
  /** The nearest choice that does go together. */
  readonly nearest?: ChoiceChange;
}

export type FrontKind = 'door' | 'drawerFront' | 'falseFront' | 'appliancePanel';

/** A door or drawer front to order (rules O1 to O5, H1). */
export interface Front {
  /** `<opening>`; a pair's leaves are `<opening>L` and `<opening>R`. */
  readonly mark: string;
  readonly opening: string;
  readonly cabinet: string;
  readonly zone: Zone;
  readonly kind: FrontKind;
  readonly style: string;
  /** `slab` when the front is too small for five pieces (O4). */
  readonly build: 'fivePiece' | 'slab';
  readonly species: string;
  readonly finish: string;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly hinge: 'left' | 'right' | 'none';
  /** Hinges on the frame; of a folding corner's second leaf, those of the joint (H2). */
  readonly hinges: number;
  readonly glass: boolean;
  /** After the style's minimum, exact, in 1/25 of a square 64th: 147,456 to 0.01 ft² (O5). */
  readonly area: number;
  /** The same in hundredths of a square foot, half up, for reading; a price line rounds once, over its sum. */
  readonly billedArea: number;
  /** Thousandths of a pound. */
  readonly weight: number;
  /** How much a crown filler shortened it (C3). */
  readonly shortenedBy: Sixtyfourths;
}

export interface FillerStrip {
  readonly mark: string;
  readonly opening: string;
  readonly zone: Zone;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly reason: 'crown' | 'valance' | 'base';
}

export interface VeneerStrip {
  readonly mark: string;
  readonly zone: Zone;
  readonly species: string;
  readonly finish: string;
  readonly member: 'stile' | 'rail' | 'mullion' | 'filler';
  /** Cabinets whose frames it covers; two when one strip bridges a seam (V1). */
  readonly cabinets: readonly string[];
  readonly width: Sixtyfourths;
  readonly length: Sixtyfourths;
}

/** A mitred end, as seen from the room. `stopped` is square. */
export interface MouldingEnd {
  readonly kind: 'outside' | 'inside' | 'stopped';
  /** Thousandths of a degree. */
  readonly miter: number;
  readonly bevel: number;
  readonly longEdge: 'front' | 'back' | 'none';
}

export interface MouldingPiece {
  readonly mark: string;
  readonly kind: 'crown' | 'base' | 'lightRail' | 'nailer';
  readonly profile: string;
  readonly zone: Zone;
  readonly species: string;
  readonly finish: string;
  readonly backLength: Sixtyfourths;
  readonly frontLength: Sixtyfourths;
  readonly left: MouldingEnd;
  readonly right: MouldingEnd;
  readonly isReturn: boolean;
}

export interface PanelPiece {
  readonly mark: string;
  readonly zone: Zone;
  readonly kind: 'end' | 'back' | 'toe' | 'islandWrap';
  readonly cabinet: string;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly notch?: { readonly width: Sixtyfourths; readonly height: Sixtyfourths };
  /** Standing sticks behind it, as thick as the frame's overhang (P1). */
  readonly sticks?: { readonly count: number; readonly thickness: Sixtyfourths };
  /** Of a panelled end or wrap: equal panels between stiles (P3). */
  readonly layout?: {
    readonly panels: number;
    readonly panelWidth: Sixtyfourths;
    readonly stile: Sixtyfourths;
    readonly rail: Sixtyfourths;
  };
  readonly species: string;
  readonly finish: string;
}

export interface DrawerBox {
  readonly mark: string;
  readonly opening: string;
  readonly zone: Zone;
  readonly kind: 'drawerBox' | 'pullOut';
  readonly material: string;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly length: Sixtyfourths;
  readonly slide: string;
  /** Packed out behind a frame and past a hinge (B3). */
  readonly spacers?: { readonly left: Sixtyfourths; readonly right: Sixtyfourths };
  /** Cut pieces, butt-jointed, and the edge band of the four top edges (B4). */
  readonly parts: readonly BoxPart[];
  readonly edgeBand: Sixtyfourths;
}

export interface BoxPart {
  readonly name: 'side' | 'front' | 'back' | 'bottom';
  readonly count: number;
  readonly width: Sixtyfourths;
  readonly length: Sixtyfourths;
}

/** One straight piece of counter over a run, islands with their whole top (M10). */
export interface CounterPiece {
  readonly mark: string;
  readonly zone: Zone;
  readonly length: Sixtyfourths;
  readonly depth: Sixtyfourths;
  /** Front and exposed edges. */
  readonly edge: Sixtyfourths;
  /** Length of splash against the wall; 0 when free-standing. */
  readonly splash: Sixtyfourths;
  readonly cutOuts: number;
}

export interface HardwareCount {
  readonly item: string;
  readonly name: string;
  readonly zone: Zone;
  readonly count: number;
  readonly parts: readonly string[];
}

export interface Schedule {
  readonly readyBusinessDays: number;
  readonly installDays: number;
  /** Days without counter, sink and kitchen: the counter's own lead time after the boxes are in (T0). */
  readonly withoutCounterDays: number;
  /** Hundredths of an hour. */
  readonly labourHours: number;
  readonly because: string;
}

export interface Takeoff {
  readonly fronts: readonly Front[];
  readonly fillers: readonly FillerStrip[];
  readonly veneer: readonly VeneerStrip[];
  readonly mouldings: readonly MouldingPiece[];
  readonly panels: readonly PanelPiece[];
  readonly boxes: readonly DrawerBox[];
  readonly counters: readonly CounterPiece[];
  readonly hardware: readonly HardwareCount[];
  /** Face covered by veneer and panels glued the same way, 0.01 ft², and adhesive for both faces, 0.01 gallon (V3). */
  readonly bonded: { readonly area: number; readonly gallons: number };
  readonly notes: readonly FitNote[];
  readonly lines: readonly PriceLine[];
  readonly subtotal: Cents;
  readonly discount: Cents;
  readonly tax: Cents;
  readonly total: Cents;
  readonly schedule: Schedule;
}

// ---------------------------------------------------------------- massing

export interface Point3 extends PlanPoint {
  readonly z: Sixtyfourths;
}

/**
 * An upright rectangular solid. `at` is the lower left corner of its front face as seen from the front,
 * `facing` the direction (unit vector in plan) in which the front looks; it extends `depth` backwards.
 */
export interface Solid {
  readonly at: Point3;
  readonly facing: { readonly x: number; readonly y: number };
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly depth: Sixtyfourths;
}

/** What a renewed surface is made of; absent on what is only drawn. */
export interface Material {
  readonly species: string;
  readonly finish: string;
}

export interface MassingFront extends Solid {
  readonly mark: string;
  readonly cabinet: string;
  readonly zone: Zone;
  readonly kind: FrontKind;
  readonly style: string;
  readonly build: 'fivePiece' | 'slab';
  readonly glass: boolean;
  readonly hinge: 'left' | 'right' | 'none';
  readonly material: Material | null;
  /** Centre of the pull on the front face, from its lower left corner; `null` on fixed panels. */
  readonly pull: {
    readonly id: string;
    readonly x: Sixtyfourths;
    readonly y: Sixtyfourths;
    readonly upright: boolean;
  } | null;
}

export interface MassingSolid extends Solid {
  readonly mark: string;
  readonly cabinet: string | null;
  readonly zone: Zone | null;
  readonly role:
    | 'box'
    | 'stile'
    | 'rail'
    | 'mullion'
    | 'fillerStrip'
    | 'endPanel'
    | 'toe'
    | 'counter'
    | 'splash'
    | 'filler'
    | 'appliance'
    | 'window'
    | 'doorway'
    | 'soffit';
  readonly appliance?: ApplianceKind;
  readonly material: Material | null;
}

/** A profile swept along a plan path. The moulding lies to the right of the path's direction, towards the room. */
export interface MassingSweep {
  readonly mark: string;
  readonly kind: 'crown' | 'base' | 'lightRail';
  readonly profile: string;
  readonly zone: Zone;
  readonly path: readonly PlanPoint[];
  readonly z: Sixtyfourths;
  readonly material: Material | null;
}

export interface Massing {
  readonly outline: readonly PlanPoint[];
  readonly ceiling: Sixtyfourths;
  readonly walls: readonly Wall[];
  readonly solids: readonly MassingSolid[];
  readonly fronts: readonly MassingFront[];
  readonly sweeps: readonly MassingSweep[];
}
