import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { MembersModule } from '../members/members.module.js';
import { RecipeRevision } from './models/recipe-revision.model.js';
import { Recipe } from './models/recipe.model.js';
import { RecipesController } from './recipes.controller.js';
import { RecipesService } from './recipes.service.js';

@Module({
  imports: [SequelizeModule.forFeature([Recipe, RecipeRevision]), MembersModule],
  controllers: [RecipesController],
  providers: [RecipesService],
  exports: [RecipesService],
})
export class RecipesModule {}
