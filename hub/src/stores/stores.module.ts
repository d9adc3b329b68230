import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { Ingredient } from './models/ingredient.model.js';
import { LotMove } from './models/lot-move.model.js';
import { LotReservation } from './models/lot-reservation.model.js';
import { Lot } from './models/lot.model.js';
import { StockBook } from './stock-book.service.js';
import { StoresService } from './stores.service.js';

@Module({
  imports: [SequelizeModule.forFeature([Ingredient, Lot, LotMove, LotReservation])],
  providers: [StoresService, StockBook],
  exports: [StoresService],
})
export class StoresModule {}
