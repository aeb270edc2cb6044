import { Inject, Injectable, Optional } from '@nestjs/common';

/** The demo's accounts, one of each kind. */
export const DEMO_ACCOUNTS = [
  { email: 'lead@eremite.example', role: 'lead' },
  { email: 'reviewer@eremite.example', role: 'reviewer' },
  { email: 'observer@eremite.example', role: 'observer' },
  { email: 'admin@eremite.example', role: 'administrator' },
] as const;

/** Fills an empty database with the demo: provided by the demo's module, called once before the service is ready. */
export interface DemoFiller {
  /** @returns the accounts made */
  fill(options: { password: string; report: (message: string) => void }): Promise<{ email: string; role: string }[]>;
}

/** Injection token of the optional {@link DemoFiller}. */
export const DEMO_FILLER = Symbol('DEMO_FILLER');

/** Holds the filler where there is one; lives in the module that imports the demo's, which exports the token. */
@Injectable()
export class DemoHook {
  constructor(@Optional() @Inject(DEMO_FILLER) readonly filler: DemoFiller | undefined) {}
}
