import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AttachmentsModule } from '../attachments/attachments.module.js';
import { AuditModule } from '../audit/audit.module.js';
import { HousesModule } from '../houses/houses.module.js';
import { MembersModule } from '../members/members.module.js';
import { LedgerService } from './ledger.service.js';
import { StoresCsvController } from './csv/stores-csv.controller.js';
import { StoresCsvService } from './csv/stores-csv.service.js';
import { LotPhotosController } from './lot-photos.controller.js';
import { LotPhotosService } from './lot-photos.service.js';
import { Ingredient } from './models/ingredient.model.js';
import { LotMove } from './models/lot-move.model.js';
import { LotReservation } from './models/lot-reservation.model.js';
import { Lot } from './models/lot.model.js';
import { ShelfService } from './shelf.service.js';
import { StockBook } from './stock-book.service.js';
import { StoresController } from './stores.controller.js';
import { StoresService } from './stores.service.js';

@Module({
  imports: [
    SequelizeModule.forFeature([Ingredient, Lot, LotMove, LotReservation]),
    AttachmentsModule,
    AuditModule,
    HousesModule,
    MembersModule,
  ],
  controllers: [StoresController, LotPhotosController, StoresCsvController],
  providers: [StoresService, StockBook, ShelfService, LedgerService, LotPhotosService, StoresCsvService],
  exports: [StoresService],
})
export class StoresModule {}
