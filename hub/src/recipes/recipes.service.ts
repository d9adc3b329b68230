import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { Recipe as RecipeAnswer, RecipeSummary, Revision } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { inHouse } from '../common/house-scope/in-house.js';
import { MembersService } from '../members/members.service.js';
import { RecipeRevision } from './models/recipe-revision.model.js';
import { Recipe } from './models/recipe.model.js';

/** A revision with the name of its recipe: what a batch or a rehearsal is made from. */
export interface NamedRevision {
  id: string;
  recipeId: string;
  recipeName: string;
  number: number;
  volumeL: number;
  document: RecipeDocument;
}

function nameRevision({ id, recipeId, number, volumeL, document, recipe }: RecipeRevision): NamedRevision {
  return { id, recipeId, recipeName: recipe?.name ?? '', number, volumeL, document };
}

@Injectable()
export class RecipesService {
  constructor(
    @InjectModel(Recipe) private readonly recipes: typeof Recipe,
    @InjectModel(RecipeRevision) private readonly revisions: typeof RecipeRevision,
    private readonly members: MembersService,
  ) {}

  async list(houseId: string): Promise<RecipeSummary[]> {
    const [recipes, revisions] = await Promise.all([
      inHouse(this.recipes, houseId).findAll({}, { order: [['name', 'ASC']] }),
      inHouse(this.revisions, houseId).findAll(
        {},
        { attributes: ['id', 'recipeId', 'number', 'volumeL', 'createdAtMs'], order: [['number', 'ASC']] },
      ),
    ]);
    // In ascending order the last one written for a recipe is the newest.
    const latest = new Map(revisions.map((revision) => [revision.recipeId, revision]));
    return recipes.flatMap((recipe) => {
      const revision = latest.get(recipe.id);
      return revision ? [summarise(recipe, revision)] : [];
    });
  }

  async get(houseId: string, id: string): Promise<RecipeAnswer> {
    const recipe = await inHouse(this.recipes, houseId).get(id, 'recipe');
    const [revisions, names] = await Promise.all([
      inHouse(this.revisions, houseId).findAll({ recipeId: id }, { order: [['number', 'DESC']] }),
      this.members.displayNames(houseId),
    ]);
    const latest = revisions[0];
    if (!latest) throw new ProblemError('not-found', 'This recipe has no revision yet.');
    return { ...summarise(recipe, latest), revisions: revisions.map((revision) => present(revision, names)) };
  }

  async findRevision(houseId: string, id: string): Promise<NamedRevision | null> {
    const revision = await inHouse(this.revisions, houseId).find(id, { include: [Recipe] });
    return revision && nameRevision(revision);
  }

  async getRevision(houseId: string, id: string): Promise<NamedRevision> {
    const revision = await this.findRevision(houseId, id);
    if (!revision) throw new ProblemError('not-found', 'There is no such revision.');
    return revision;
  }

  /** The newest revision of the house's first recipe: what a rehearsal practises when nothing else is chosen. */
  async getFirstRecipeRevision(houseId: string): Promise<NamedRevision> {
    const first = await inHouse(this.recipes, houseId).findOne(
      {},
      {
        order: [
          ['createdAtMs', 'ASC'],
          ['id', 'ASC'],
        ],
      },
    );
    const revision =
      first &&
      (await inHouse(this.revisions, houseId).findOne(
        { recipeId: first.id },
        { include: [Recipe], order: [['number', 'DESC']] },
      ));
    if (!revision) throw new ProblemError('not-found', 'This house has no recipe yet.');
    return nameRevision(revision);
  }

  async findRevisions(houseId: string, ids: string[]): Promise<Map<string, NamedRevision>> {
    const rows = await inHouse(this.revisions, houseId).findAll({ id: ids }, { include: [Recipe] });
    return new Map(rows.map((row) => [row.id, nameRevision(row)]));
  }
}

function summarise({ id, name, summary, archivedAtMs }: Recipe, latest: RecipeRevision): RecipeSummary {
  return {
    id,
    name,
    summary,
    latestRevisionId: latest.id,
    latestRevisionNumber: latest.number,
    isArchived: archivedAtMs !== null,
    volumeL: latest.volumeL,
    changedAtMs: latest.createdAtMs,
  };
}

function present(row: RecipeRevision, names: Map<string, string>): Revision {
  const { id, recipeId, number, note, createdAtMs, createdBy, document } = row;
  return { id, recipeId, number, note, createdAtMs, createdBy: names.get(createdBy) ?? 'somebody', document };
}
