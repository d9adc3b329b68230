import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { HubConfig } from '../config/environment.js';
import { connectionOptions } from './connection-options.js';

/** The one connection pool. Tables are made by migrations before the hub starts; there is no `sync()`. */
@Module({
  imports: [
    SequelizeModule.forRootAsync({
      inject: [HubConfig],
      useFactory: (config: HubConfig) => ({
        ...connectionOptions(config.databaseUrl),
        autoLoadModels: true,
        synchronize: false,
        retryAttempts: 2,
        retryDelay: 500,
      }),
    }),
  ],
})
export class DatabaseModule {}
