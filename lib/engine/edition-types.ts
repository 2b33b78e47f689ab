import type { CalendarDate, Cents, ChoiceKey, LineClass, Sixtyfourths, Unit, Zone } from './types';

/** A closed polygon or polyline in a section; x out from the face, y up. */
export interface ProfilePoint {
  readonly x: Sixtyfourths;
  readonly y: Sixtyfourths;
}

/** What every option has. `price` meanings stand at each kind. */
interface OptionBase {
  readonly id: string;
  readonly name: string;
  /** One plain sentence for the homeowner. */
  readonly about?: string;
  /** Order of business days from release to delivery, beyond the edition's own lead time. */
  readonly leadTimeDays?: number;
  /** Marked special-order by the supplier (deposit caps, restocking). */
  readonly specialOrder?: boolean;
}

/** A door style; drawings, 3D and sheets all come from these figures. */
export interface DoorStyle extends OptionBase {
  readonly construction: 'fivePiece' | 'slab' | 'plank';
  readonly panel: 'flat' | 'raised' | 'beaded' | 'none';
  readonly stile: Sixtyfourths;
  readonly rail: Sixtyfourths;
  /** Narrower rails of five-piece drawer fronts. */
  readonly drawerRail: Sixtyfourths;
  readonly thickness: Sixtyfourths;
  readonly panelThickness: Sixtyfourths;
  readonly groove: Sixtyfourths;
  /** Its panel is solid wood and moves with the season (O7); both grooves together leave it `panelPlay` to grow. */
  readonly solidPanel?: boolean;
  readonly panelPlay?: Sixtyfourths;
  /** Section of the inner (sticking) edge and of the outer edge, for drawing and the 3D template. */
  readonly innerEdge: readonly ProfilePoint[];
  readonly outerEdge: readonly ProfilePoint[];
  readonly panelProfile: readonly ProfilePoint[];
  /** Boards across a plank door. */
  readonly plankWidth?: Sixtyfourths;
  readonly smallestPanel: Sixtyfourths;
  readonly smallestDrawerHeight: Sixtyfourths;
  readonly smallestHeight: Sixtyfourths;
  readonly widestLeaf: Sixtyfourths;
  readonly smallestRowGap: Sixtyfourths;
  /** Hundredths of a square foot billed at least, per front. */
  readonly minimumArea: number;
  /** Per square foot, before species and finish factors; slab fronts at `slabPrice`. */
  readonly price: Cents;
  readonly slabPrice: Cents;
  /** Added for each front ordered without its panel and finished inside. */
  readonly glassPrice?: Cents;
  /** Option ids that go with it; absent means all. */
  readonly overlays?: readonly string[];
  readonly species?: readonly string[];
}

export type FinishFamily = 'clear' | 'stain' | 'paint' | 'thermofoil';

export interface Species extends OptionBase {
  readonly family: 'hardwood' | 'paintGrade' | 'thermofoil';
  /** Millionths per percent of moisture content (O7). */
  readonly radial: number;
  readonly tangential: number;
  /** Pounds-force, as published. */
  readonly janka: number;
  /** Thousandths of a pound per cubic inch at 8 %. */
  readonly density: number;
  /** `#rrggbb` under a clear finish. */
  readonly colour: string;
  readonly grain: 'fine' | 'medium' | 'coarse' | 'none';
  /** Added per square foot of front. */
  readonly frontPrice: Cents;
  /** Per square foot of frame covered. */
  readonly veneerPrice: Cents;
  /** Per foot, added to a moulding's own price. */
  readonly mouldingPrice: Cents;
  readonly panelPrice: Cents;
  readonly finishes: readonly FinishFamily[];
}

export interface Finish extends OptionBase {
  readonly family: FinishFamily;
  /** `#rrggbb` of a paint; of a stain per species id (never multiplied over the wood). */
  readonly colour?: string;
  readonly colours?: Readonly<Record<string, string>>;
  /** Added per square foot of front, veneer and panel. */
  readonly price: Cents;
  readonly mouldingPrice: Cents;
}

export interface Overlay extends OptionBase {
  /** On every side unless the top has its own. */
  readonly amount: Sixtyfourths;
  readonly gap: Sixtyfourths;
  readonly hingeSet: string;
  readonly setback: Sixtyfourths;
}

/** A supplier's chart: rows "up to" and including the limit, first match wins (H1). */
export interface HingeSet extends OptionBase {
  readonly overlay: Sixtyfourths;
  readonly softClose: boolean;
  readonly openingAngle: number;
  readonly intrusion: Sixtyfourths;
  /** Least reveal a leaf hinged on that member needs (O3). */
  readonly smallestReveal: Sixtyfourths;
  readonly byHeight: readonly { readonly upTo: Sixtyfourths; readonly hinges: number }[];
  /** `upTo` in thousandths of a pound. */
  readonly byWeight: readonly { readonly upTo: number; readonly hinges: number }[];
  readonly extraAboveWidth?: { readonly width: Sixtyfourths; readonly hinges: number };
  readonly price: Cents;
  /** What joins the two leaves of a folding corner (H2). */
  readonly fold?: { readonly name: string; readonly hinges: number; readonly price: Cents };
}

export interface MouldingProfile extends OptionBase {
  readonly kind: 'crown' | 'base' | 'lightRail';
  /** Section as installed; origin at the face of the frame, at the moulding's lower back edge. */
  readonly section: readonly ProfilePoint[];
  /** Flat face width, and spring angle off the wall in thousandths of a degree (crown). */
  readonly face: Sixtyfourths;
  readonly spring: number;
  readonly height: Sixtyfourths;
  readonly projection: Sixtyfourths;
  /** Per foot. */
  readonly price: Cents;
  readonly finishes?: readonly FinishFamily[];
}

export interface Pull extends OptionBase {
  readonly form: 'knob' | 'bar' | 'cup' | 'arch' | 'none';
  /** Between screw centres; 0 for a knob. */
  readonly centres: Sixtyfourths;
  readonly projection: Sixtyfourths;
  readonly colour: string;
  readonly price: Cents;
}

export interface Storage extends OptionBase {
  readonly kind: 'pullOut' | 'trayDivider' | 'bin' | 'none';
  readonly openings: readonly ('door' | 'pair' | 'drawer')[];
  readonly smallestWidth: Sixtyfourths;
  readonly smallestDepth: Sixtyfourths;
  readonly perOpening: number;
  readonly slide?: string;
  readonly price: Cents;
}

export interface DrawerBoxOption extends OptionBase {
  /** `none` keeps the boxes that are there. */
  readonly material: 'melamine' | 'birch' | 'none';
  readonly thickness: Sixtyfourths;
  readonly slide: string;
  readonly price: Cents;
}

export interface Slide {
  readonly id: string;
  readonly name: string;
  /** Per side. */
  readonly space: Sixtyfourths;
  readonly ratedPounds: number;
  readonly softClose: boolean;
  readonly price: Cents;
}

export interface EndTreatment extends OptionBase {
  readonly kind: 'flat' | 'panelled';
  /** Per square foot. */
  readonly price: Cents;
  /** Glued on like veneer, so that its area takes adhesive (V3). */
  readonly bonded?: boolean;
  /** Of a panelled end: stiles and rails, and the widest panel between them (P3). */
  readonly stile?: Sixtyfourths;
  readonly rail?: Sixtyfourths;
  readonly widestPanel?: Sixtyfourths;
}

/** A new box with its frame, where a cabinet is replaced or added (S4). */
export interface NewCabinet {
  readonly tier: 'base' | 'wall' | 'tall';
  readonly each: Cents;
  /** Per foot of width. */
  readonly foot: Cents;
  /** Hundredths of an hour each. */
  readonly hours: number;
}

export interface Counter extends OptionBase {
  readonly kind: 'keep' | 'allowance' | 'priced';
  readonly overhang: Sixtyfourths;
  readonly thickness: Sixtyfourths;
  readonly pricePerSquareFoot: Cents;
  readonly pricePerEdgeFoot: Cents;
  readonly pricePerCutOut: Cents;
  /** Per foot of splash against a wall. */
  readonly pricePerSplashFoot?: Cents;
  readonly allowance: Cents;
  readonly leadTimeDays?: number;
}

/** A rate for work that is counted from the takeoff. */
export interface LabourRate {
  readonly code: string;
  readonly label: string;
  readonly per:
    | 'front'
    | 'hinge'
    | 'veneerArea'
    | 'mouldingFoot'
    | 'nailerFoot'
    | 'fillerStrip'
    | 'panel'
    | 'toeFoot'
    | 'box'
    | 'removal'
    | 'newCabinet'
    | 'job';
  readonly unit: Unit;
  readonly class: LineClass;
  /** Hundredths of an hour each; install days come from their sum (T1). */
  readonly hours: number;
  readonly price: Cents;
}

/** One published, unchangeable version of a price book, without costs: what a homeowner's browser may hold (M8). */
export interface Edition {
  readonly version: 1;
  readonly number: number;
  readonly title: string;
  readonly publishedOn: CalendarDate;
  readonly styles: readonly DoorStyle[];
  readonly species: readonly Species[];
  readonly finishes: readonly Finish[];
  readonly overlays: readonly Overlay[];
  readonly hingeSets: readonly HingeSet[];
  readonly crowns: readonly MouldingProfile[];
  readonly bases: readonly MouldingProfile[];
  readonly lightRails: readonly MouldingProfile[];
  readonly pulls: readonly Pull[];
  readonly storage: readonly Storage[];
  readonly drawerBoxes: readonly DrawerBoxOption[];
  readonly slides: readonly Slide[];
  readonly ends: readonly EndTreatment[];
  readonly counters: readonly Counter[];
  readonly labour: readonly LabourRate[];
  readonly newCabinets: readonly NewCabinet[];
  /** Keys that may differ by zone; the rest are chosen for the whole kitchen. */
  readonly zonedKeys: readonly ChoiceKey[];
  readonly shop: ShopSettings;
  /** Agreed in advance, such as a sink-base floor (M10). */
  readonly hiddenDamage: readonly {
    readonly code: string;
    readonly label: string;
    readonly unit: Unit;
    readonly price: Cents;
  }[];
  /** Charged per ordered part removed after release (M6). */
  readonly restocking: readonly {
    readonly part: 'front' | 'moulding' | 'box' | 'panel';
    readonly price: Cents;
  }[];
  readonly leadTimeDays: number;
}

/** Numbers that a shop sets for itself. */
export interface ShopSettings {
  readonly bumper: Sixtyfourths;
  readonly crownClearance: Sixtyfourths;
  readonly nailerLap: Sixtyfourths;
  readonly veneerTrim: Sixtyfourths;
  readonly baseClearance: Sixtyfourths;
  readonly valanceClearance: Sixtyfourths;
  readonly slideRearAllowance: Sixtyfourths;
  readonly boxHeightClearance: Sixtyfourths;
  readonly panelThickness: Sixtyfourths;
  readonly kerf: Sixtyfourths;
  readonly stockLengths: readonly Sixtyfourths[];
  readonly sheet: { readonly width: Sixtyfourths; readonly height: Sixtyfourths };
  /** Square feet of one face that a gallon covers (V3). */
  readonly adhesiveCoverage: number;
  /** Hours that one of the crew works in a day (T1). */
  readonly crewHoursPerDay: number;
  /** Thickness of a box's back panel (B2). */
  readonly boxBack: Sixtyfourths;
  /** Thickness of drawer-box parts (B4). */
  readonly boxThickness: Sixtyfourths;
  readonly pullOutHeight: Sixtyfourths;
  /** Pounds that a cubic foot of drawer may come to hold (B2). */
  readonly loadPerCubicFoot: number;
  /** Moisture content in percent between which a solid panel lives (O7). */
  readonly moisture: { readonly from: number; readonly to: number };
  /** Added to each moulding piece for the saw (C6). */
  readonly endAllowance: Sixtyfourths;
}

/** What an edition costs the contractor; never leaves the server for a homeowner. Keys are option and labour ids. */
export interface EditionCosts {
  readonly version: 1;
  readonly number: number;
  /** Parts per million of the price, by option or labour id; `default` for the rest. */
  readonly costShare: Readonly<Record<string, number>>;
}

/** The job's own terms of computation: place, tax, discount. */
export interface Terms {
  readonly version: 1;
  readonly tax: {
    readonly mode: 'onLines' | 'onMaterials' | 'none';
    readonly basis: 'invoice' | 'item';
    /** Parts per million by class of line; several rates of one class are aggregated first (M3). */
    readonly rates: Readonly<Partial<Record<LineClass, readonly number[]>>>;
    readonly place: string;
    readonly exemption?: string;
  };
  readonly discount:
    | { readonly kind: 'none' }
    | { readonly kind: 'amount'; readonly cents: Cents }
    | { readonly kind: 'percent'; readonly ppm: number };
  readonly crewSize: number;
}

export type { Zone };
