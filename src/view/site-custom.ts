export interface PhaseLetters {
  readonly a: string;
  readonly b: string;
  readonly c: string;
}

/** What this site calls its phases, the zone its clocks show, and its near mark as a ratio: plain, for islands. */
export interface SiteCustom {
  readonly phaseLetters: PhaseLetters;
  readonly timeZone: string;
  readonly nearRatio: number;
}

interface SiteSettings {
  readonly PHASE_LETTERS: string;
  readonly SITE_TIME_ZONE: string;
  readonly NEAR_RATIO: number;
}

export function siteCustom(settings: SiteSettings): SiteCustom {
  const [a = 'A', b = 'B', c = 'C'] = settings.PHASE_LETTERS.split(',');
  return { phaseLetters: { a, b, c }, timeZone: settings.SITE_TIME_ZONE, nearRatio: settings.NEAR_RATIO };
}
