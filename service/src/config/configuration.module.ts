import { type DynamicModule, Module } from '@nestjs/common';
import { ConfigModule, ConfigService } from '@nestjs/config';
import { ENV, type Env } from './env.ts';

/** Hands the validated environment to whoever injects ENV. */
@Module({})
export class ConfigurationModule {
  static register(env: Env): DynamicModule {
    return {
      module: ConfigurationModule,
      global: true,
      imports: [ConfigModule.forRoot({ ignoreEnvFile: true, ignoreEnvVars: true, load: [() => ({ env })] })],
      providers: [
        { provide: ENV, inject: [ConfigService], useFactory: (config: ConfigService) => config.getOrThrow<Env>('env') },
      ],
      exports: [ENV],
    };
  }
}
