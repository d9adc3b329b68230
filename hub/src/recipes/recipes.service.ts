import { isDeepStrictEqual } from 'node:util';
import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type {
  CreateRecipe,
  CreateRevision,
  Recipe as RecipeAnswer,
  RecipeSummary,
  Revision,
  UpdateRecipe,
} from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { RecipeDocument, RunSheet } from '@steepfall/shared/sheets';
import { Op, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { HousesService } from '../houses/houses.service.js';
import { MembersService } from '../members/members.service.js';
import { RecipeRevision } from './models/recipe-revision.model.js';
import { Recipe } from './models/recipe.model.js';
import { sheetOf } from './sheet-of.js';

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
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly houses: HousesService,
    private readonly members: MembersService,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  async list(houseId: string, { archived }: { archived: boolean }): Promise<RecipeSummary[]> {
    const [recipes, revisions] = await Promise.all([
      inHouse(this.recipes, houseId).findAll(
        { archivedAtMs: archived ? { [Op.ne]: null } : null },
        { order: [['name', 'ASC']] },
      ),
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

  async create(actor: Actor, { name, summary, ...first }: CreateRecipe): Promise<RecipeAnswer> {
    await this.checkSheet(actor.houseId, first.document);
    const id = newId();
    await inTransaction(this.sequelize, async (transaction) => {
      await inHouse(this.recipes, actor.houseId).create(
        { id, name, summary, createdAtMs: this.clock.nowMs() },
        { transaction },
      );
      await this.audit.recordAct(actor, 'recipe.created', id, { name }, transaction);
      await this.write(actor, id, 1, first, transaction);
    });
    return this.get(actor.houseId, id);
  }

  /** Another name, or put away and back. Putting away only hides: who knows a revision can still plan a batch of it. */
  async update(actor: Actor, id: string, changes: UpdateRecipe): Promise<RecipeSummary> {
    const { isArchived, ...words } = changes;
    await inTransaction(this.sequelize, async (transaction) => {
      const recipe = await this.lock(actor.houseId, id, transaction);
      const archivedAtMs = isArchived ? (recipe.archivedAtMs ?? this.clock.nowMs()) : null;
      await recipe.update({ ...words, ...(isArchived === undefined ? {} : { archivedAtMs }) }, { transaction });
      await this.audit.recordAct(actor, 'recipe.changed', id, changes, transaction);
    });
    const { revisions: _, ...summary } = await this.get(actor.houseId, id);
    return summary;
  }

  /** Adds a revision on top of the newest. Of two who save at once, the second is told of the first, and nothing of either is lost. */
  async revise(actor: Actor, id: string, { baseRevisionId, ...next }: CreateRevision): Promise<RecipeAnswer> {
    await this.checkSheet(actor.houseId, next.document);
    const rival = await inTransaction(this.sequelize, async (transaction) => {
      await this.lock(actor.houseId, id, transaction);
      const rows = inHouse(this.revisions, actor.houseId);
      const base = await rows.findOne({ id: baseRevisionId, recipeId: id }, { transaction });
      const newest = await rows.findOne({ recipeId: id }, { order: [['number', 'DESC']], transaction });
      if (!base || !newest) throw misfit('/baseRevisionId', 'This recipe has no such revision.');
      if (newest.id !== base.id) return newest;
      if (isDeepStrictEqual(next.document, base.document))
        throw misfit('/document', `Nothing is different from revision ${base.number}. Change something, then save.`);
      await this.write(actor, id, base.number + 1, next, transaction);
      return null;
    });
    if (rival) throw savedMeanwhile(rival, await this.members.displayNames(actor.houseId));
    return this.get(actor.houseId, id);
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

  /** The run sheet of a revision at this place. */
  sheetOf({ document }: NamedRevision, altitudeM: number): RunSheet {
    return sheetOf(document, altitudeM, null);
  }

  /** The newest revision of the house's first recipe that is not put away: what a rehearsal practises when nothing else is chosen. */
  async getFirstRecipeRevision(houseId: string): Promise<NamedRevision> {
    const first = await inHouse(this.recipes, houseId).findOne(
      {},
      {
        // NULL comes first: what is put away is practised only when there is nothing else.
        order: [
          ['archivedAtMs', 'ASC'],
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

  private lock(houseId: string, id: string, transaction: Transaction): Promise<Recipe> {
    return inHouse(this.recipes, houseId).get(id, 'recipe', { transaction, lock: transaction.LOCK.UPDATE });
  }

  /** A revision of which no run sheet can be made is of no use to anybody: its brewer is told now, and not on the day. */
  private async checkSheet(houseId: string, document: RecipeDocument): Promise<void> {
    const { altitudeM } = await this.houses.get(houseId);
    sheetOf(document, altitudeM, '/document');
  }

  private async write(
    actor: Actor,
    recipeId: string,
    number: number,
    { note, document }: { note: string; document: RecipeDocument },
    transaction: Transaction,
  ): Promise<void> {
    const { id } = await inHouse(this.revisions, actor.houseId).create(
      {
        id: newId(),
        recipeId,
        number,
        note,
        createdAtMs: this.clock.nowMs(),
        createdBy: actor.memberId,
        volumeL: document.volumeL,
        document,
      },
      { transaction },
    );
    await this.audit.recordAct(actor, 'recipe.revised', recipeId, { number, revisionId: id }, transaction);
  }
}

function misfit(pointer: string, detail: string): ProblemError {
  return new ProblemError('not-valid', detail, { errors: [{ pointer, detail }] });
}

const dayAndTime = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short' });

function savedMeanwhile(rival: RecipeRevision, names: Map<string, string>): ProblemError {
  const who = names.get(rival.createdBy) ?? 'Somebody';
  const what = rival.note === '' ? '' : ` ("${rival.note}")`;
  const when = dayAndTime.format(rival.createdAtMs);
  return new ProblemError(
    'changed-meanwhile',
    `${who} saved revision ${rival.number}${what} on ${when}. Look at it, then save yours on top of it.`,
  );
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
