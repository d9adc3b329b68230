import { useEffect, useId, useMemo, useRef, useState } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { ingredientSchema, type Lot } from '@steepfall/shared/contracts';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { sendHubFile } from '#lib/api-client.ts';
import type { Upload } from '#lib/http.ts';
import { lotPhotoQuery, storesQuery } from '#lib/hub-queries.ts';
import { offerUndo } from '#lib/undo.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { noteIngredient, useStoresAct } from './use-stores.ts';

/** An address for a picture that only this page can read. */
function useObjectUrl(content: Blob | null | undefined): string | null {
  const url = useMemo(() => (content ? URL.createObjectURL(content) : null), [content]);
  useEffect(
    () => () => {
      if (url) URL.revokeObjectURL(url);
    },
    [url],
  );
  return url;
}

/** The label of a lot as it was photographed; a press shows it large. */
export function LabelPhoto({ lot, mayManage }: { lot: Lot; mayManage: boolean }) {
  const [isOpen, setIsOpen] = useState(false);
  const photo = useQuery({ ...lotPhotoQuery(lot), enabled: lot.hasPhoto });
  const url = useObjectUrl(lot.hasPhoto ? photo.data : null);
  return (
    <>
      <button
        type="button"
        onClick={() => setIsOpen(true)}
        className="grid aspect-4/3 w-full max-w-52 max-md:not-data-full:aspect-auto max-md:not-data-full:min-h-12 cursor-pointer place-items-center overflow-hidden rounded-lg border-2 border-dashed border-hair bg-sunken text-body font-medium text-soft hover:border-edge hover:text-text data-full:border-solid"
        data-full={url ? '' : undefined}
      >
        {url ? (
          <img src={url} alt={`Label of lot ${lot.code}; press to see it large`} className="size-full object-cover" />
        ) : lot.hasPhoto ? (
          <span>{photo.isError ? 'The photo could not be fetched' : 'Fetching the photo'}</span>
        ) : (
          <span>
            Photo of the label<span className="sr-only"> of lot {lot.code}</span>
          </span>
        )}
      </button>
      {isOpen ? <PhotoDialog lot={lot} shown={url} mayManage={mayManage} onClose={() => setIsOpen(false)} /> : null}
    </>
  );
}

function sendPhoto(lotId: string, photo: Blob, upload: Pick<Upload, 'onProgress' | 'signal'> = {}) {
  const form = new FormData();
  form.append('photo', photo);
  return sendHubFile(ingredientSchema, `stores/lots/${lotId}/photo`, { form, ...upload });
}

interface PhotoDialogProps {
  lot: Lot;
  shown: string | null;
  mayManage: boolean;
  onClose: () => void;
}

function PhotoDialog({ lot, shown, mayManage, onClose }: PhotoDialogProps) {
  const client = useQueryClient();
  const input = useRef<HTMLInputElement>(null);
  const errorId = useId();
  const [file, setFile] = useState<File | null>(null);
  const [sentRatio, setSentRatio] = useState(0);
  const [isUnreadable, setIsUnreadable] = useState(false);
  const preview = useObjectUrl(file);
  const sending = useRef<AbortController | null>(null);
  const send = useMutation({
    mutationFn: (photo: File) => {
      sending.current = new AbortController();
      return sendPhoto(lot.id, photo, { onProgress: setSentRatio, signal: sending.current.signal });
    },
    onSuccess: (ingredient) => {
      noteIngredient(client, ingredient);
      void client.invalidateQueries({ queryKey: storesQuery.queryKey });
      onClose();
    },
  });
  const remove = useStoresAct(() => [`stores/lots/${lot.id}/photo`, { method: 'DELETE' }]);
  const kept = client.getQueryData(lotPhotoQuery(lot).queryKey);
  const offerBack = () => {
    if (kept) {
      offerUndo(`Photo of lot ${lot.code} removed.`, async () => noteIngredient(client, await sendPhoto(lot.id, kept)));
    }
    onClose();
  };
  const choose = (chosen: File | undefined) => {
    if (!chosen) return;
    send.reset();
    setSentRatio(0);
    setIsUnreadable(false);
    setFile(chosen);
  };
  const error = isStopped(send.error) ? null : (send.error ?? remove.error);
  const seen = preview ?? shown;
  return (
    <Dialog isOpen onClose={onClose} title={`Label of lot ${lot.code}`} size="wide">
      <div className="grid gap-5">
        {seen && isUnreadable ? (
          <p>This device cannot show {file?.name ?? 'it'} as a picture. It may be of another kind.</p>
        ) : seen ? (
          <img
            src={seen}
            onError={() => setIsUnreadable(true)}
            alt={file ? `${file.name}, not sent yet` : `Label of lot ${lot.code}`}
            className="max-h-[60dvh] w-full rounded-lg bg-sunken object-contain"
          />
        ) : (
          <p className="text-soft">
            The lot number, the date and the allergens on one picture: whoever asks later can read it again.
          </p>
        )}
        <input
          ref={input}
          type="file"
          accept="image/*"
          aria-label="Photo of the label"
          aria-describedby={error ? errorId : undefined}
          aria-invalid={error ? true : undefined}
          className="sr-only"
          tabIndex={-1}
          onChange={({ target }) => {
            choose(target.files?.[0]);
            target.value = '';
          }}
        />
        {send.isPending ? (
          <div className="grid gap-2">
            <progress
              max={1}
              value={sentRatio}
              aria-label="Sent"
              className="h-3 w-full appearance-none overflow-hidden rounded bg-sunken [&::-moz-progress-bar]:bg-text [&::-webkit-progress-bar]:bg-sunken [&::-webkit-progress-value]:bg-text"
            />
            <p className="text-soft tabular-nums">
              {sentRatio < 1 ? `${Math.round(sentRatio * 100)} % sent` : 'Sent. The hub looks at it.'}
            </p>
          </div>
        ) : null}
        {error ? (
          <p id={errorId} role="alert" className="flex gap-2.5 text-body font-medium text-ember">
            <ShapeGlyph shape="diamond" className="mt-1.5 size-3.5 shrink-0" />
            {fieldProblems(error)[0]?.detail ?? failureWords(error)}
          </p>
        ) : null}
        <div className="flex flex-wrap gap-3">
          {file && mayManage ? (
            <Button look="primary" isBusy={send.isPending} busyLabel="Sending" onClick={() => send.mutate(file)}>
              Keep this photo
            </Button>
          ) : null}
          {mayManage ? (
            <Button look={file ? 'plain' : 'primary'} disabled={send.isPending} onClick={() => input.current?.click()}>
              {seen ? 'Another photo' : 'Take or choose a photo'}
            </Button>
          ) : null}
          {lot.hasPhoto && !file && mayManage ? (
            <Button
              look="danger"
              isBusy={remove.isPending}
              busyLabel="Removing"
              onClick={() => remove.mutate(undefined, { onSuccess: offerBack })}
            >
              Remove the photo
            </Button>
          ) : null}
          {send.isPending ? (
            <Button onClick={() => sending.current?.abort()}>Stop</Button>
          ) : (
            <Button onClick={onClose}>Close</Button>
          )}
        </div>
      </div>
    </Dialog>
  );
}

const isStopped = (error: Error | null) => error instanceof DOMException && error.name === 'AbortError';
