import { memo, useEffect, useMemo, useRef, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Recipe, Revision } from '@steepfall/shared/contracts';
import { deskFigures, revisionDifferences } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { FormProvider, useForm, useFormContext, useWatch, type FieldErrors } from 'react-hook-form';
import { Link, useNavigate } from 'react-router-dom';
import { Button } from '#components/button.tsx';
import { TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { useTabTitle } from '#components/page.tsx';
import { storesQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { quantityOf, useUnits } from '#lib/units.ts';
import { useStored } from '#lib/value-store.ts';
import { fieldProblems } from '#lib/words.ts';
import { AcidProposal } from './acid-proposal.tsx';
import { AdditionsPart } from './additions-part.tsx';
import { ConflictDialog } from './conflict-dialog.tsx';
import { CostLines } from './cost-lines.tsx';
import { DaySection, TargetsSection } from './day-part.tsx';
import { KitChooser, useDeskKit } from './desk-kit.tsx';
import { DeskPlaceProvider, useDeskPlace } from './desk-place.tsx';
import { draftsAreKept, dropDraft, keepDraft } from './drafts.ts';
import { FallLine } from './fall-line.tsx';
import { FiguresColumn } from './figures-column.tsx';
import { LeadsStrip } from './leads-strip.tsx';
import { NumberField, SmallLabel } from './number-field.tsx';
import { isSameJson, recipeResolver, wrongPaths, type RecipeForm } from './recipe-form.ts';
import { SaveDialog } from './save-dialog.tsx';
import { ScaleDialog } from './scale-dialog.tsx';
import { SheetSection } from './sheet-section.tsx';
import { useDesk, type Desk as DeskState } from './use-desk.ts';
import { usePart } from './use-part.ts';
import { useSave } from './use-save.ts';
import { WarningList } from './warning-list.tsx';
import { WaterSection } from './water-part.tsx';

interface RecipeEditorProps {
  /** Null for a recipe that is new. */
  recipe: Recipe | null;
  base: Revision | null;
  saved: RecipeForm | null;
  start: RecipeForm;
  /** Where what is typed is kept on this device. */
  draftKey: string;
}

/** The desk: what goes in at the left, the planned line in the middle, the figures at the right. */
export function RecipeEditor(props: RecipeEditorProps) {
  const form = useForm<RecipeForm>({
    resolver: recipeResolver,
    defaultValues: props.start,
    mode: 'onChange',
  });
  const { trigger } = form;
  // A draft may come back with what was wrong in it. An empty name is no news before anything was typed.
  const isFresh = props.start.name === '';
  useEffect(() => {
    if (!isFresh) void trigger();
  }, [isFresh, trigger]);
  return (
    <FormProvider {...form}>
      <DeskPlaceProvider>
        <Desk {...props} />
      </DeskPlaceProvider>
    </FormProvider>
  );
}

function Desk({ recipe, base, saved, draftKey, start }: RecipeEditorProps) {
  const navigate = useNavigate();
  const units = useUnits();
  const { control, handleSubmit, setValue, setError } = useFormContext<RecipeForm>();
  const { openPath } = useDeskPlace();
  const { kit, kettles, resolutionG } = useDeskKit();
  const values = useWatch({ control }) as RecipeForm;
  const desk = useDesk(values.document, kit, units);
  const savedFigures = useMemo(() => {
    const result = base && kit ? deskFigures(base.document, kit, units) : null;
    return result?.kind === 'figures' ? result : null;
  }, [base, kit, units]);
  const { isKept, drop } = useDraft(draftKey, values, saved ?? start, base?.id ?? null);
  const [ready, setReady] = useState<RecipeForm | null>(null);
  const [isScaling, setIsScaling] = useState(false);
  const [wrongCount, setWrongCount] = useState(0);
  const title = values.name.trim() || (recipe ? recipe.name : 'New recipe');
  useTabTitle(title);

  const saving = useSave({
    recipe,
    base,
    onSaved: ({ id }) => {
      drop();
      void navigate(`/recipes/${id}`);
    },
    onRefused: (error) => {
      const problems = fieldProblems(error);
      for (const { field, detail } of problems) setError(field as 'name', { type: 'hub', message: detail });
      if (problems[0]) {
        setReady(null);
        openPath(problems[0].field.replace(/^document\./, ''));
      }
    },
  });
  const isChanged = !isSameJson(values, saved ?? start) || (!saved && start.name !== '');

  const refuse = (errors: FieldErrors<RecipeForm>) => {
    const paths = wrongPaths(errors);
    setWrongCount(paths.length);
    if (paths[0]) openPath(paths[0]);
  };
  const ask = (form: RecipeForm) => {
    setWrongCount(0);
    saving.forget();
    setReady(form);
  };
  const take = (document: RecipeDocument) => {
    setValue('document', document, { shouldDirty: true, shouldValidate: true });
    setIsScaling(false);
  };
  const figures = (
    <div className="grid gap-7">
      <FiguresColumn desk={desk} saved={savedFigures} isEditable />
      {desk.document ? <CostLines document={desk.document} /> : null}
    </div>
  );
  const warnings = (go: (path: string) => void) =>
    values.document.additions.length === 0 && !desk.impossible ? (
      <p className="text-lead text-soft">
        Nothing goes in yet. Add a tea, hops and an acid: the line, the figures and what to look out for follow as you
        type.
      </p>
    ) : (
      <WarningList warnings={desk.figures?.warnings ?? []} impossible={desk.impossible} onGo={go} />
    );
  const line = desk.figures && desk.document && <FallLine day={desk.figures.day} document={desk.document} />;
  return (
    <div className="pb-32 xl:pb-16">
      <header className="sticky top-0 z-20 border-b-2 border-edge bg-ground">
        <div className="mx-auto flex w-full max-w-[104rem] items-center gap-x-4 px-5 py-2 sm:px-8 xl:px-10">
          <div className="min-w-0 flex-1">
            <h1 className="truncate text-lead font-semibold" tabIndex={-1}>
              {title}
            </h1>
            <p role="status" className="truncate text-note text-soft">
              {stateWords({ isChanged, isKept, revision: base?.number ?? null, wrongCount })}
            </p>
          </div>
          <div className="flex items-center gap-2">
            <Link
              to={recipe ? `/recipes/${recipe.id}` : '/recipes'}
              className="hidden min-h-12 items-center px-3 text-body underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text sm:flex"
            >
              Leave
            </Link>
            <Button onClick={() => setIsScaling(true)} disabled={!desk.document || desk.isOld}>
              Scale
            </Button>
            <Button look="primary" onClick={() => void handleSubmit(ask, refuse)()} disabled={!isChanged}>
              Save
            </Button>
          </div>
        </div>
      </header>

      <div className="mx-auto grid w-full max-w-[104rem] gap-x-10 gap-y-12 px-5 pt-6 sm:px-8 lg:grid-cols-[minmax(0,1fr)_minmax(0,25rem)] xl:px-10 xl:grid-cols-[minmax(0,20rem)_minmax(0,1fr)_minmax(0,20rem)] min-[87rem]:grid-cols-[minmax(0,23rem)_minmax(0,1fr)_minmax(0,22.5rem)] min-[87rem]:gap-x-12">
        <RecipeFields />
        <div className="hidden lg:sticky lg:top-20 lg:block lg:max-h-[calc(100dvh-9.5rem)] lg:self-start lg:overflow-y-auto lg:pb-8 lg:pr-2 xl:contents">
          <section
            aria-label="The planned line"
            className="xl:sticky xl:top-20 xl:max-h-[calc(100dvh-5rem)] xl:self-start xl:overflow-y-auto xl:pb-8"
          >
            <h2 className="sr-only">The planned day</h2>
            <OldWords desk={desk} />
            {line}
            <div className="mt-6 grid gap-6">
              <AcidProposal desk={desk} kit={kit} />
              {warnings(openPath)}
            </div>
          </section>
          <section
            aria-label="Figures"
            className="mt-10 xl:sticky xl:top-20 xl:mt-0 xl:max-h-[calc(100dvh-5rem)] xl:self-start xl:overflow-y-auto xl:pb-8 xl:pr-2"
          >
            <h2 className="sr-only">Figures</h2>
            <div className="mb-4">
              <KitChooser />
            </div>
            {figures}
          </section>
        </div>
      </div>
      <div className="mx-auto mt-14 w-full max-w-[104rem] px-5 sm:px-8 xl:px-10">
        <SheetSection document={desk.document} />
      </div>

      <LeadsStrip desk={desk}>
        {(close) => (
          <div className="grid gap-8">
            <OldWords desk={desk} />
            {line}
            <div className="grid gap-4">
              <KitChooser />
              {figures}
            </div>
            <AcidProposal desk={desk} kit={kit} />
            {warnings((path) => {
              close();
              openPath(path);
            })}
          </div>
        )}
      </LeadsStrip>

      {ready && !saving.conflict ? (
        <SaveDialog
          isNew={!recipe}
          differences={base ? revisionDifferences(base.document, ready.document, units) : []}
          onClose={() => setReady(null)}
          onSave={(note) => saving.save({ form: ready, note })}
          isBusy={saving.isSaving}
          error={saving.error}
        />
      ) : null}
      {saving.conflict ? (
        <ConflictDialog
          conflict={saving.conflict}
          onChoose={saving.settle}
          onGoOn={() => {
            saving.goOn();
            setReady(null);
          }}
          isBusy={saving.isSettling}
          error={saving.settleError}
        />
      ) : null}
      {isScaling && desk.document ? (
        <ScaleDialog
          document={desk.document}
          kettles={kettles}
          resolutionG={resolutionG}
          onTake={take}
          onClose={() => setIsScaling(false)}
        />
      ) : null}
    </div>
  );
}

function OldWords({ desk: { isOld, figures, impossible } }: { desk: DeskState }) {
  const isShown = isOld && figures !== null;
  const why = impossible
    ? 'what is typed now cannot be worked out'
    : 'one field holds something that cannot be reckoned with';
  return (
    <p role="status" className={isShown ? 'mb-3 text-note font-medium' : 'sr-only'}>
      {isShown ? `As of before: ${why}.` : ''}
    </p>
  );
}

interface StateFacts {
  isChanged: boolean;
  isKept: boolean;
  revision: number | null;
  wrongCount: number;
}

function stateWords({ isChanged, isKept, revision, wrongCount }: StateFacts): string {
  if (wrongCount > 0) {
    return wrongCount === 1
      ? 'Not saved: one field needs another look'
      : `Not saved: ${wrongCount} fields need another look`;
  }
  if (!isChanged) return revision === null ? 'Nothing to save yet' : `As saved, revision ${revision}`;
  return isKept
    ? 'Not saved yet, kept on this device'
    : 'Not saved, and this browser keeps nothing: save before you leave';
}

/** Keeps every change on this device at once, and forgets it when nothing differs any more. */
function useDraft(draftKey: string, values: RecipeForm, unchanged: RecipeForm, baseRevisionId: string | null) {
  const { house, member } = useKnown();
  const person = useMemo(() => ({ houseId: house.id, memberId: member.id }), [house.id, member.id]);
  const isOver = useRef(false);
  useEffect(() => {
    if (isOver.current) return;
    if (isSameJson(values, unchanged)) dropDraft(person, draftKey);
    else keepDraft(person, draftKey, { savedAtMs: Date.now(), baseRevisionId, form: values });
  }, [values, unchanged, person, draftKey, baseRevisionId]);
  return {
    isKept: useStored(draftsAreKept),
    drop: () => {
      isOver.current = true;
      dropDraft(person, draftKey);
    },
  };
}

/** Everything that is typed, in the order of the day. Each part listens for itself, so that a key press draws one part again. */
const RecipeFields = memo(function RecipeFields() {
  const units = useUnits();
  const { register, formState } = useFormContext<RecipeForm>();
  const volume = usePart('volumeL');
  const water = usePart('waterL');
  const litres = quantityOf('volume', units);
  const { data: stores = [] } = useQuery(storesQuery);
  return (
    <form
      noValidate
      onSubmit={(event) => event.preventDefault()}
      className="@container grid min-w-0 content-start gap-10 [&_:is(input,button,select)]:scroll-mt-24 [&_:is(input,button,select)]:scroll-mb-40"
    >
      <section aria-label="The recipe" className="grid gap-4">
        <LevelRule>The recipe</LevelRule>
        <TextField
          label={<SmallLabel>Name</SmallLabel>}
          autoComplete="off"
          error={formState.errors.name?.message}
          {...register('name')}
        />
        <TextField
          label={<SmallLabel>In a sentence</SmallLabel>}
          autoComplete="off"
          placeholder="Green and bright: a short steep, hops on the fall"
          error={formState.errors.summary?.message}
          {...register('summary')}
        />
        <div className="grid grid-cols-2 items-end gap-3">
          <NumberField
            label="Drink in the keg"
            path="volumeL"
            scale={litres}
            value={volume.value}
            error={volume.errorAt()}
            onChange={(volumeL = Number.NaN) => volume.change(volumeL)}
          />
          <NumberField
            label="Water in the kettle"
            path="waterL"
            scale={litres}
            value={water.value}
            error={water.errorAt()}
            onChange={(waterL = Number.NaN) => water.change(waterL)}
          />
        </div>
      </section>
      <WaterSection />
      <AdditionsPart
        title="Salts and acid"
        kinds={['salt', 'acid']}
        empty="Nothing yet. Salts give the water body; an acid brings the drink to its pH."
        stores={stores}
      />
      <AdditionsPart title="Tea" kinds={['tea']} empty="Nothing yet. Several teas make a blend." stores={stores} />
      <AdditionsPart title="Hops" kinds={['hops']} empty="Nothing yet. Several hops make a blend." stores={stores} />
      <AdditionsPart
        title="Anything else"
        kinds={['other']}
        empty="Peel, spice, flowers: weighed and timed, in no sum but the yield."
        stores={stores}
      />
      <DaySection />
      <TargetsSection />
    </form>
  );
});
