/** The invented network's substations, by register key: nine of the demo, then those of the story lines. */
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
  dunmarsh: 'Dunmarsh',
  oxhollow: 'Oxhollow',
  rimside: 'Rimside',
  'pellan-cross': 'Pellan Cross',
  'calder-stye': 'Calder Stye',
} as const;
export type SubstationKey = keyof typeof substations;
