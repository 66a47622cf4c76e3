/**
 * How large anything in a site may be. Generous for any real site, and small enough that a slipped
 * key, a wrong unit or a damaged file is noticed. Reading and editing keep to the same limits, so
 * that whatever can be entered can also be saved and opened again.
 */
export const LIMITS = {
  /** 100 m, longer than any beam, rack or stack. */
  lengthMm: 100_000,
  /** 1 000 t, more than any run of racking carries. */
  massKg: 1_000_000,
  /** Mass of a metre of beam or goods. */
  lineKgPerM: 1_000_000,
  /** Twice that of the heaviest metal. */
  densityKgPerM3: 50_000,
  forceN: 1e10,
  stressNPerMm2: 1e6,
  /** Second moments of joists end near 1e10 mm⁴. */
  secondMomentMm4: 1e13,
  sectionModulusMm3: 1e10,
  /** Far beyond any connector: fixed for every purpose. */
  stiffnessNmmPerRad: 1e15,
  /** A ratio of two ends or two halves. */
  ratio: 1e6,
  idLength: 64,
  nameLength: 200,
  detailLength: 1_000,
  notesLength: 100_000,
  runs: 10_000,
  baysInRun: 10_000,
  levelsInBay: 100,
  goodsOnLevel: 1_000,
  damagesOnFrame: 1_000,
  damagesOnLevel: 1_000,
  libraryEntries: 500_000,
  /** Columns, points, bearers, feet, runners, table rows of one entry. */
  rows: 1_000,
  panelsOnLevel: 1_000,
  /** Problems listed of one file. */
  problems: 1_000,
} as const;
