import type { CreateRecipe, CreateRevision, Recipe, Revision } from '@steepfall/shared/contracts';
import { problem } from '@steepfall/shared/problems';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { buildDocument, buildHops, buildTea } from '@steepfall/shared/testing';
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { newId } from '#lib/ids.ts';
import { signIn } from '#lib/session.ts';
import { RecipeEditorPage } from './recipe-editor-page.tsx';

/** What the hub keeps of one recipe; everything else it is asked for is an empty list. */
class RecipeHub {
  readonly id = newId();
  readonly made: CreateRecipe[] = [];
  revisions: Revision[];

  constructor(document: RecipeDocument) {
    this.revisions = [this.revision(document, 1, 'First try.', 'Brewer')];
  }

  save(document: RecipeDocument, note: string, by: string): void {
    this.revisions = [this.revision(document, this.revisions.length + 1, note, by), ...this.revisions];
  }

  get newest(): Revision {
    return this.revisions[0]!;
  }

  private revision(document: RecipeDocument, number: number, note: string, createdBy: string): Revision {
    return { id: newId(), recipeId: this.id, number, note, createdAtMs: 1, createdBy, document };
  }

  private get recipe(): Recipe {
    const { id, number, document } = this.newest;
    return {
      id: this.id,
      name: 'Sencha and Cascade',
      summary: '',
      latestRevisionId: id,
      latestRevisionNumber: number,
      isArchived: false,
      volumeL: document.volumeL,
      changedAtMs: 1,
      revisions: this.revisions,
    };
  }

  readonly fetch = (input: RequestInfo | URL, init?: RequestInit): Promise<Response> => {
    const path = new URL(String(input), 'http://hub').pathname.replace('/api/', '');
    const body = typeof init?.body === 'string' ? (JSON.parse(init.body) as unknown) : null;
    return Promise.resolve(this.answer(path, init?.method ?? 'GET', body));
  };

  private answer(path: string, method: string, body: unknown): Response {
    const json = (value: unknown, status = 200) => new Response(JSON.stringify(value), { status });
    if (path === 'auth/sign-in') return json(session);
    if (path === `recipes/${this.id}`) return json(this.recipe);
    if (path === `recipes/${this.id}/revisions`) {
      const { baseRevisionId, document, note } = body as CreateRevision;
      if (baseRevisionId !== this.newest.id) return json(problem('changed-meanwhile', 'Another saved.'), 409);
      this.save(document, note, 'Brewer');
      return json(this.recipe, 201);
    }
    if (path === 'recipes' && method === 'POST') {
      this.made.push(body as CreateRecipe);
      return json({ ...this.recipe, name: (body as CreateRecipe).name }, 201);
    }
    return json([]);
  }
}

const session = {
  accessToken: 'token',
  expiresAtMs: 4_000_000_000_000,
  member: { id: newId(), displayName: 'Brewer', email: 'brewer@wrenfold.example', role: 'brewer', isActive: true },
  house: { id: newId(), name: 'Wrenfold Drinks', altitudeM: 120, currency: 'EUR', version: 1 },
};

let hub: RecipeHub;
// A whole desk in jsdom is slow on a machine that has other work.
vi.setConfig({ testTimeout: 20_000 });

beforeEach(async () => {
  hub = new RecipeHub(buildDocument({ additions: [buildTea({ massG: 90 }), buildHops({ massG: 60 })] }));
  vi.stubGlobal('fetch', hub.fetch);
  Element.prototype.scrollIntoView = () => {};
  await signIn({ email: 'brewer@wrenfold.example', password: 'a password' });
});

afterEach(() => vi.unstubAllGlobals());

function openDesk(path = `/recipes/${hub.id}/edit`): void {
  const router = createMemoryRouter(
    [
      { path: '/recipes/new', element: <RecipeEditorPage /> },
      { path: '/recipes/:recipeId/edit', element: <RecipeEditorPage /> },
      { path: '/recipes/:recipeId', element: <p>the page of the recipe</p> },
    ],
    { initialEntries: [path] },
  );
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}

const field = (name: string) => screen.findByLabelText<HTMLInputElement>(name);
const type = async (name: string, value: string) => fireEvent.change(await field(name), { target: { value } });
// By its words: to find a role among all fields and steps of a desk takes jsdom a second.
const press = async (name: string) => userEvent.click(await screen.findByText(name, { selector: 'button' }));

/** No-break spaces are right on a screen and hard to read in a test. */
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

async function saveWith(massG: string): Promise<void> {
  await type('Amount of Cascade', massG);
  await press('Save');
  const dialog = await screen.findByRole('dialog');
  await userEvent.click(within(dialog).getByText('Save', { selector: 'button' }));
}

describe('a field of the desk', () => {
  it.each([
    ['-3', 'A mass above 0 g.'],
    ['', 'Type a number.'],
    ['1e9', 'At most 100 kg.'],
    ['a lot', 'Type a number.'],
  ])('says of "%s" what to do, keeps it, and the figures stand as of before', async (typed, words) => {
    openDesk();
    await type('Amount of sencha', typed);
    expect((await screen.findAllByText(words)).length).toBeGreaterThan(0);
    expect((await field('Amount of sencha')).value).toBe(typed);
    expect((await screen.findAllByText(/As of before/)).length).toBeGreaterThan(0);
    await press('Save');
    const sencha = await field('Amount of sencha');
    await waitFor(() => expect(document.activeElement).toBe(sencha));
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(hub.revisions).toHaveLength(1);
  });

  it.each(['NaN', '', 'lively', '99'])('says so where a number stands beside another: "%s"', async (typed) => {
    openDesk();
    await type('Gas', typed);
    expect((await screen.findAllByText(typed === '99' ? 'At most 6.' : 'Type a number.')).length).toBeGreaterThan(0);
  });

  it('shows grams and grams per litre of one addition, whichever is typed', async () => {
    openDesk();
    await type('For each litre of Cascade', '2');
    expect((await field('Amount of Cascade')).value).toBe('44');
  });
});

describe('what was typed and not saved', () => {
  it('is offered again after a reload, and goes on from there', async () => {
    openDesk();
    await type('Amount of Cascade', '48');
    cleanup();
    openDesk();
    expect(await screen.findByText(/You changed this just now and did not save/)).toBeTruthy();
    expect(screen.getByText('48 g')).toBeTruthy();
    await press('Go on with it');
    expect((await field('Amount of Cascade')).value).toBe('48');
  });

  it('can be put away, and is gone when it is saved', async () => {
    openDesk();
    await type('Amount of Cascade', '48');
    cleanup();
    openDesk();
    await press('Put it away');
    expect((await field('Amount of Cascade')).value).toBe('60');
    await saveWith('50');
    expect(await screen.findByText('the page of the recipe')).toBeTruthy();
    expect(plain(hub.newest.note)).toContain('Cascade 60 → 50 g');
    cleanup();
    openDesk();
    expect((await field('Amount of Cascade')).value).toBe('50');
  });
});

describe('somebody saved meanwhile', () => {
  const theirGas = () => hub.save({ ...hub.newest.document, gas: { volumes: 2.5, tempC: 4 } }, 'Less gas.', 'Owner');
  const cascadeG = (document: RecipeDocument) => document.additions.find(({ id }) => id === 'cascade')?.massG;

  it('joins both when nothing collides', async () => {
    openDesk();
    await field('Amount of Cascade');
    theirGas();
    await saveWith('48');
    await press('Join both');
    await waitFor(() => expect(hub.revisions).toHaveLength(3));
    expect(hub.newest.document.gas.volumes).toBe(2.5);
    expect(cascadeG(hub.newest.document)).toBe(48);
  });

  it('shows what collides, and then offers no joining', async () => {
    openDesk();
    await field('Amount of Cascade');
    hub.save({ ...hub.newest.document, additions: [buildTea({ massG: 90 }), buildHops({ massG: 55 })] }, '', 'Owner');
    await saveWith('48');
    const collides = await screen.findByLabelText('What collides');
    expect(plain(collides.textContent)).toContain('you 48 g, Owner 55 g');
    expect(screen.queryByText('Join both')).toBeNull();
    await press('Save mine on top');
    await waitFor(() => expect(hub.revisions).toHaveLength(3));
    expect(hub.revisions.map(({ document }) => cascadeG(document))).toEqual([48, 55, 60]);
  });

  it('keeps mine as a recipe of its own', async () => {
    openDesk();
    await field('Amount of Cascade');
    theirGas();
    await saveWith('48');
    await press('Keep mine as a recipe of its own');
    await waitFor(() => expect(hub.made).toHaveLength(1));
    expect(hub.made[0]?.name).toBe('Sencha and Cascade, my version');
    expect(cascadeG(hub.made[0]!.document)).toBe(48);
    expect(hub.revisions).toHaveLength(2);
  });

  it('does not take its own revision, whose answer was lost, for that of another', async () => {
    openDesk();
    await field('Amount of Cascade');
    hub.save({ ...hub.newest.document, additions: [buildTea({ massG: 90 }), buildHops({ massG: 48 })] }, '', 'Brewer');
    await saveWith('48');
    expect(await screen.findByText('the page of the recipe')).toBeTruthy();
    expect(hub.revisions).toHaveLength(2);
  });

  it('goes on editing with nothing lost', async () => {
    openDesk();
    await field('Amount of Cascade');
    theirGas();
    await saveWith('48');
    await press('Go on editing');
    expect((await field('Amount of Cascade')).value).toBe('48');
    expect(hub.revisions).toHaveLength(2);
  });
});
