import { createReadStream, existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { observationFields } from '@eremite/shared/contracts/observation';
import { Injectable } from '@nestjs/common';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { FilesService } from '../files/files.service.ts';
import { ObservationsService } from '../observations/observations.service.ts';
import { demoFile } from './demo-tables.ts';

/** Images and spectra of the demo's telling cases, which find their detections as anyone's files do. */
@Injectable()
export class DemoObservations {
  constructor(
    private readonly files: FilesService,
    private readonly observations: ObservationsService,
  ) {}

  async fill(lead: SignedInUser, surveyId: string): Promise<void> {
    const folder = demoFile('observations');
    if (!existsSync(folder)) return;
    for (const fileName of readdirSync(folder).sort()) {
      const saved = await this.files.save(createReadStream(join(folder, fileName)));
      await this.observations.addToSurvey(lead, surveyId, { ...saved, fileName }, observationFields.parse({}));
    }
  }
}
