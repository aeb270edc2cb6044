import { Global, Module } from '@nestjs/common';
import { TileStore } from './tile-store.ts';

@Global()
@Module({ providers: [TileStore], exports: [TileStore] })
export class TilesModule {}
