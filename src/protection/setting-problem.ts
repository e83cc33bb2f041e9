/** What is wrong with one recorded setting: its field, and a whole sentence that says what is allowed. */
export interface SettingProblem {
  readonly field: string;
  readonly problem: string;
}
