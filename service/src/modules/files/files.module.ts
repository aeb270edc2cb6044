import { Global, Module } from '@nestjs/common';
import { FilesService } from './files.service.ts';

@Global()
@Module({ providers: [FilesService], exports: [FilesService] })
export class FilesModule {}
