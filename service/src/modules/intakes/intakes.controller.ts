import { intake, updateIntakeRequest } from '@eremite/shared/contracts/intake';
import { intakeSettings } from '@eremite/shared/contracts/intake-settings';
import { jobAccepted } from '@eremite/shared/contracts/job';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import {
  Body,
  Controller,
  createParamDecorator,
  Delete,
  type ExecutionContext,
  Get,
  HttpCode,
  Param,
  Patch,
  Post,
  Query,
  SerializeOptions,
  UseInterceptors,
} from '@nestjs/common';
import { z } from 'zod';
import { guardJson } from '../../common/json-guard.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { IntakesService } from './intakes.service.ts';
import { type UploadedTable, UploadInterceptor } from './upload.interceptor.ts';

const id = { schema: z.uuid() };
/** Settings come as JSON text in a field of the form. */
const settingsText = z.string().transform((text, context) => {
  guardJson(Buffer.from(text));
  try {
    return JSON.parse(text) as unknown;
  } catch {
    context.addIssue({ code: 'custom', message: 'settings must be JSON' });
    return z.NEVER;
  }
});
const uploadFields = z.object({ settings: settingsText.pipe(intakeSettings).optional() });
const Upload = createParamDecorator(
  (_: unknown, context: ExecutionContext) => context.switchToHttp().getRequest<{ upload: UploadedTable }>().upload,
);

@Controller()
export class IntakesController {
  constructor(private readonly intakes: IntakesService) {}

  @Get('surveys/:surveyId/intakes')
  @SerializeOptions({ schema: listOf(intake) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', id) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.intakes.list(user, surveyId, query);
  }

  @Post('surveys/:surveyId/intakes')
  @UseInterceptors(UploadInterceptor)
  @SerializeOptions({ schema: intake })
  create(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', id) surveyId: string,
    @Upload() upload: UploadedTable,
    @Body({ schema: uploadFields }) { settings }: z.output<typeof uploadFields>,
  ) {
    return this.intakes.create(user, surveyId, upload, settings);
  }

  @Get('intakes/:id')
  @SerializeOptions({ schema: intake })
  get(@CurrentUser() user: SignedInUser, @Param('id', id) intakeId: string) {
    return this.intakes.get(user, intakeId);
  }

  @Patch('intakes/:id')
  @SerializeOptions({ schema: intake })
  update(
    @CurrentUser() user: SignedInUser,
    @Param('id', id) intakeId: string,
    @Body({ schema: updateIntakeRequest }) { settings }: z.output<typeof updateIntakeRequest>,
  ) {
    return this.intakes.update(user, intakeId, settings);
  }

  /** Further files of the same catalogue, in the multipart field `file`. */
  @Post('intakes/:id/parts')
  @UseInterceptors(UploadInterceptor)
  @SerializeOptions({ schema: intake })
  addParts(@CurrentUser() user: SignedInUser, @Param('id', id) intakeId: string, @Upload() upload: UploadedTable) {
    return this.intakes.addParts(user, intakeId, upload);
  }

  @Delete('intakes/:id/parts/:part')
  @SerializeOptions({ schema: intake })
  removePart(
    @CurrentUser() user: SignedInUser,
    @Param('id', id) intakeId: string,
    @Param('part', { schema: z.coerce.number().int().min(1).max(1000) }) part: number,
  ) {
    return this.intakes.removePart(user, intakeId, part);
  }

  @Post('intakes/:id/publish')
  @HttpCode(202)
  @SerializeOptions({ schema: jobAccepted })
  publish(@CurrentUser() user: SignedInUser, @Param('id', id) intakeId: string) {
    return this.intakes.publish(user, intakeId);
  }

  @Delete('intakes/:id')
  @HttpCode(204)
  discard(@CurrentUser() user: SignedInUser, @Param('id', id) intakeId: string): Promise<void> {
    return this.intakes.discard(user, intakeId);
  }
}
