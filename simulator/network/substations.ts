/** The invented network's nine substations, by register key. */
export const substations = {
  skelder: 'Skelder',
  'low-pell': 'Low Pell',
  hask: 'Hask',
  ostrel: 'Ostrel',
  quillby: 'Quillby',
  brindle: 'Brindle',
  fennick: 'Fennick',
  'tarn-head': 'Tarn Head',
  'marrow-gate': 'Marrow Gate',
} as const;
export type SubstationKey = keyof typeof substations;
