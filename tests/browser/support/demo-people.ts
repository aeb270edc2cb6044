/** Password of every account of the demo that the browser tests use. */
export const DEMO_PASSWORD = 'quiet hydrogen far away';

export type DemoRole = 'lead' | 'reviewer' | 'observer' | 'admin';

export const emailOf = (role: DemoRole): string => `${role}@eremite.example`;
