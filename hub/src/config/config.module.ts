import { Global, Module, type DynamicModule } from '@nestjs/common';
import { HubConfig } from './environment.js';

@Global()
@Module({})
export class ConfigModule {
  static forRoot(config: HubConfig): DynamicModule {
    return { module: ConfigModule, providers: [{ provide: HubConfig, useValue: config }], exports: [HubConfig] };
  }
}
