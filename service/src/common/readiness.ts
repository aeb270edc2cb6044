import { Injectable } from '@nestjs/common';

/** Whether the service may be used: migrated and, on a new database, filled. */
@Injectable()
export class Readiness {
  ready = false;
  /** What it is still doing. */
  doing = 'starting';
}
