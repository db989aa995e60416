export const surveyKeys = {
  ofLake: (lakeId: string) => ['surveys', 'lake', lakeId] as const,
  one: (visitId: string) => ['surveys', 'visit', visitId] as const,
  peg: (pegId: string) => ['surveys', 'peg', pegId] as const,
  pegs: (lakeId: string) => ['surveys', 'pegs', lakeId] as const,
};
