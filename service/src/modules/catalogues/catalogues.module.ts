import { Module } from '@nestjs/common';
import { CataloguesController } from './catalogues.controller.ts';
import { CataloguesRepository } from './catalogues.repository.ts';
import { CataloguesService } from './catalogues.service.ts';

@Module({
  controllers: [CataloguesController],
  providers: [CataloguesRepository, CataloguesService],
  exports: [CataloguesService],
})
export class CataloguesModule {}
