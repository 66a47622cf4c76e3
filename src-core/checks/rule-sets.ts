export type RuleSetName = 'european' | 'united-states' | 'australian';
export type RuleKey = string;
