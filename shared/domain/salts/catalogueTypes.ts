/** A value with the source it was taken from; `memory` means nobody has looked it up. */
export type Sourced<T> = { value: T; source: string };

/** Mass fractions 0..1 by element, ion or oxide. */
export type Fractions = { values: Record<string, number>; source: string };

/** Which list of explosives precursors names a substance. */
export type PrecursorList = 'restricted' | 'reportable';

export type SignalWord = 'Danger' | 'Warning';

/** Temperatures in degrees Celsius at which solubilities are listed. */
export const solubilityTemperatures = [0, 10, 20, 25, 30, 40] as const;

/** Grams by temperature, in the order of `solubilityTemperatures`; null: unknown. */
export type ByTemperature = readonly (number | null)[];

/** One salt of the shipped list. */
export type CatalogueSalt = {
  id: string;
  name: string;
  commonNames: readonly string[];
  iupacName: Sourced<string>;
  /** With a middle dot before crystal water. */
  formula: string;
  cas: Sourced<string>;
  /** g/mol. */
  molarMass: Sourced<number>;
  elements: Fractions;
  equivalents: Fractions;
  /** Mass fraction of crystal water. */
  crystalWater: Sourced<number>;
  solubility: {
    asSoldPer100gAddedWater: ByTemperature | null;
    anhydrousPer100gTotalWater: ByTemperature | null;
    anhydrousMassPercent: ByTemperature | null;
    note: string | null;
    source: string;
  };
  /** kg/L, poured; for bag and jar volume only. */
  bulkDensity: { low: number; high: number; source: string };
  appearance: Sourced<string>;
  /** `criticalHumidity`: per cent relative humidity at 30 °C above which the open salt takes up water. */
  hygroscopicity: { value: string; criticalHumidity: number | null; source: string };
  /** Hazard statements; an empty list means commonly sold as not classified. */
  ghs: { statements: readonly string[]; signalWord: SignalWord | null; source: string };
  transport: Sourced<string>;
  regulatoryFlags: readonly { list: PrecursorList; value: string; source: string }[];
  storage: Sourced<string>;
  supplies: readonly string[];
  notes: readonly Sourced<string>[];
  /** What the bag's label promises, where that and not the formula counts. */
  labelAssay: Fractions | null;
};

/** What every page may need of a salt of the shipped list. */
export type SaltIndexEntry = {
  id: string;
  name: string;
  formula: string;
  cas: string;
  statements: readonly string[];
  signalWord: SignalWord | null;
  list: PrecursorList | null;
};
