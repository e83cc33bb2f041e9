import type { SeriesPoint } from '../../src/standing/sen-slope';

/** Worked by hand in course notes of Holy Cross Montserrat. */
export const BY_HAND = [12.9, 14.8, 13.2, 15.7, 13.8, 15.6, 12.9, 11.0, 17.3, 15.9, 19.0, 18.3, 20.1, 21.7];

/** Frost days; Schönwiese, 1992, page 114. */
export const FROST_DAYS = [9, 12, 4, 3, 0, 4, 2, 1, 4, 2, 9, 7];

/** Yearly flow of the Nile at Aswan, 1871 to 1970: the R data set of that name. */
export const NILE = [
  1120, 1160, 963, 1210, 1160, 1160, 813, 1230, 1370, 1140, 995, 935, 1110, 994, 1020, 960, 1180, 799, 958,
  1140, 1100, 1210, 1150, 1250, 1260, 1220, 1030, 1100, 774, 840, 874, 694, 940, 833, 701, 916, 692, 1020,
  1050, 969, 831, 726, 456, 824, 702, 1120, 1100, 832, 764, 821, 768, 845, 864, 862, 698, 845, 744, 796, 1040,
  759, 781, 865, 845, 944, 984, 897, 822, 1010, 771, 676, 649, 846, 812, 742, 801, 1040, 860, 874, 848, 890,
  744, 749, 838, 1050, 918, 986, 797, 923, 975, 815, 1020, 906, 901, 1170, 912, 746, 919, 718, 714, 740,
];

/** The values at times 0, 1, 2, … */
export function atSteps(values: readonly number[]): SeriesPoint[] {
  return values.map((value, time) => ({ time, value }));
}
