/** Every address of the application, in one place, so that links cannot drift from the routes. */
const survey = (id: string) => `/surveys/${id}`;

export const paths = {
  signIn: (from?: string) => (from && from !== '/' ? `/sign-in?from=${encodeURIComponent(from)}` : '/sign-in'),
  surveys: () => '/surveys',
  survey,
  detections: (surveyId: string, search = '') => `${survey(surveyId)}/detections${search}`,
  detection: (surveyId: string, detectionId: string, search = '') =>
    `${survey(surveyId)}/detections/${detectionId}${search}`,
  plots: (surveyId: string, search = '') => `${survey(surveyId)}/plots${search}`,
  docket: (surveyId: string) => `${survey(surveyId)}/docket`,
  docketDetection: (surveyId: string, detectionId: string, search = '') =>
    `${survey(surveyId)}/docket/${detectionId}${search}`,
  shortlist: (surveyId: string) => `${survey(surveyId)}/shortlist`,
  editions: (surveyId: string) => `${survey(surveyId)}/editions`,
  edition: (surveyId: string, editionId: string) => `${survey(surveyId)}/editions/${editionId}`,
  catalogues: (surveyId: string) => `${survey(surveyId)}/catalogues`,
  catalogue: (surveyId: string, catalogueId: string) => `${survey(surveyId)}/catalogues/${catalogueId}`,
  /** With a catalogue: to bring in its next version. */
  intakes: (surveyId: string, supersedes?: string) =>
    `${survey(surveyId)}/intake${supersedes ? `?supersedes=${supersedes}` : ''}`,
  intake: (surveyId: string, intakeId: string, search = '') => `${survey(surveyId)}/intake/${intakeId}${search}`,
  criteria: (surveyId: string) => `${survey(surveyId)}/criteria`,
  criteriaNumber: (surveyId: string, criteriaId: string) => `${survey(surveyId)}/criteria/${criteriaId}`,
  newCriteria: (surveyId: string, from?: string) => `${survey(surveyId)}/criteria/new${from ? `?from=${from}` : ''}`,
  runs: (surveyId: string) => `${survey(surveyId)}/runs`,
  run: (surveyId: string, runId: string) => `${survey(surveyId)}/runs/${runId}`,
  runDifference: (surveyId: string, runId: string, from: string) =>
    `${survey(surveyId)}/runs/${runId}/difference?from=${from}`,
  ledger: (surveyId: string) => `${survey(surveyId)}/ledger`,
  people: (surveyId: string) => `${survey(surveyId)}/people`,
  surveySettings: (surveyId: string) => `${survey(surveyId)}/settings`,
  methods: (method?: string) => (method ? `/methods#${method}` : '/methods'),
  account: () => '/account',
  administration: () => '/administration',
} as const;

/** Where the service answers. */
export const API_BASE = '/api/v1';
