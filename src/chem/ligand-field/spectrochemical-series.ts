/**
 * Ligands by the Δ that they cause, the weakest first, under the abbreviations of the register.
 *
 * The order is that of the textbooks; neighbours change places from metal to metal.
 *
 * @see D. F. Shriver, P. Atkins, Inorganic Chemistry, 5th ed., Oxford 2010, ch. 20 (from memory)
 */
export const SPECTROCHEMICAL_SERIES = [
  'I',
  'Br',
  'S',
  'SCN',
  'Cl',
  'N3',
  'F',
  'OH',
  'ox',
  'H2O',
  'NCS',
  'MeCN',
  'py',
  'NH3',
  'en',
  'bpy',
  'phen',
  'NO2',
  'PPh3',
  'CN',
  'CO',
] as const;
