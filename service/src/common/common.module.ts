import { Global, Module } from '@nestjs/common';
import { AccessRepository } from './access.repository.ts';
import { AccessService } from './access.ts';

@Global()
@Module({ providers: [AccessRepository, AccessService], exports: [AccessService] })
export class CommonModule {}
