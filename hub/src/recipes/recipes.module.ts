import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditModule } from '../audit/audit.module.js';
import { HousesModule } from '../houses/houses.module.js';
import { MembersModule } from '../members/members.module.js';
import { RecipeRevision } from './models/recipe-revision.model.js';
import { Recipe } from './models/recipe.model.js';
import { RecipesController } from './recipes.controller.js';
import { RecipesService } from './recipes.service.js';

@Module({
  imports: [SequelizeModule.forFeature([Recipe, RecipeRevision]), HousesModule, MembersModule, AuditModule],
  controllers: [RecipesController],
  providers: [RecipesService],
  exports: [RecipesService],
})
export class RecipesModule {}
