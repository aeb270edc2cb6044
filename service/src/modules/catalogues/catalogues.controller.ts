import { catalogue, catalogueMagnitudes, catalogueRow, catalogueRowsQuery } from '@eremite/shared/contracts/catalogue';
import { sidelinedRow } from '@eremite/shared/contracts/intake';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import { Controller, Delete, Get, Headers, HttpCode, Param, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { CataloguesService } from './catalogues.service.ts';
import { sidelinedFile } from './sidelined-file.ts';

const id = { schema: z.uuid() };
const sidelinedQuery = listQuery.extend({ format: z.enum(['json', 'csv']).optional() });

@Controller()
export class CataloguesController {
  constructor(private readonly catalogues: CataloguesService) {}

  @Get('surveys/:surveyId/catalogues')
  @SerializeOptions({ schema: listOf(catalogue) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', id) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.catalogues.list(user, surveyId, query);
  }

  @Get('catalogues/:id')
  @SerializeOptions({ schema: catalogue })
  get(@CurrentUser() user: SignedInUser, @Param('id', id) catalogueId: string) {
    return this.catalogues.get(user, catalogueId);
  }

  @Delete('catalogues/:id')
  @HttpCode(204)
  remove(@CurrentUser() user: SignedInUser, @Param('id', id) catalogueId: string): Promise<void> {
    return this.catalogues.remove(user, catalogueId);
  }

  @Get('catalogues/:id/rows')
  @SerializeOptions({ schema: listOf(catalogueRow) })
  rows(
    @CurrentUser() user: SignedInUser,
    @Param('id', id) catalogueId: string,
    @Query({ schema: catalogueRowsQuery }) query: z.output<typeof catalogueRowsQuery>,
  ) {
    return this.catalogues.rows(user, catalogueId, query);
  }

  @Get('catalogues/:id/magnitudes')
  @SerializeOptions({ schema: catalogueMagnitudes })
  magnitudes(@CurrentUser() user: SignedInUser, @Param('id', id) catalogueId: string) {
    return this.catalogues.magnitudes(user, catalogueId);
  }

  /** A list, or with `format=csv` or `Accept: text/csv` the original rows with the reason. */
  @Get('catalogues/:id/sidelined')
  @SerializeOptions({ schema: listOf(sidelinedRow) })
  async sidelined(
    @CurrentUser() user: SignedInUser,
    @Param('id', id) catalogueId: string,
    @Query({ schema: sidelinedQuery }) query: z.output<typeof sidelinedQuery>,
    @Headers('accept') accept: string | undefined,
  ) {
    const asCsv = query.format === 'csv' || (query.format === undefined && /^\s*text\/csv/i.test(accept ?? ''));
    if (!asCsv) return this.catalogues.sidelined(user, catalogueId, query);
    return sidelinedFile(await this.catalogues.sidelinedTable(user, catalogueId));
  }
}
