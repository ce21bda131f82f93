'use client';

import { useSearchParams } from 'next/navigation';
import { useId, useState } from 'react';
import { ask, AskFailed } from '@/components/lists/ask';
import { Button } from '@/components/ui/button';
import { DialogButton } from '@/components/ui/dialog-button';
import { CONTROL_CLASS } from '@/components/ui/field';
import { TextLink } from '@/components/ui/text-link';
import { type SavedView, savedQuery, savedViewsSchema } from '@/lib/contracts/saved-view';

interface SavedViewsProps {
  readonly views: readonly SavedView[];
  readonly onViews: (views: readonly SavedView[]) => void;
  /** The internal route of the list's saved views. */
  readonly route: string;
  /** The address of all rows, of the revision that is shown. */
  readonly plainHref: string;
}

/** One's own views of a list: gone to, saved, renamed, deleted. */
export function SavedViews({ views, onViews, route, plainHref }: SavedViewsProps) {
  const id = useId();
  const params = useSearchParams();
  const query = savedQuery(new URLSearchParams(params.toString()));
  const [name, setName] = useState('');
  const [renaming, setRenaming] = useState<SavedView | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const current = views.find((view) => view.query === query);

  const send = async (path: string, method: 'POST' | 'PATCH' | 'DELETE', body: unknown): Promise<void> => {
    setBusy(true);
    try {
      onViews(
        await ask(`${route}${path}`, savedViewsSchema, {
          method,
          ...(body === null
            ? {}
            : { body: JSON.stringify(body), headers: { 'Content-Type': 'application/json' } }),
        }),
      );
      setFailure(null);
      setName('');
      setRenaming(null);
    } catch (error) {
      if (!(error instanceof AskFailed)) throw error;
      setFailure(error.message);
    } finally {
      setBusy(false);
    }
  };
  const taken = views.some((view) => view.name === name.trim());

  return (
    <DialogButton
      words={current === undefined ? 'Views' : `View: ${current.name}`}
      title="Views of this list"
    >
      <p className="text-ink-2">
        A view keeps filter, order, columns and grouping, for you alone. To show it to others, send them the
        address of the page.
      </p>
      {views.length === 0 ? (
        <p>You have saved none yet.</p>
      ) : (
        <ul className="grid border-t border-rule">
          {views.map((view) => (
            <li
              key={view.id}
              className="flex min-h-10 flex-wrap items-center gap-x-4 border-b border-rule py-1"
            >
              {renaming?.id === view.id ? (
                <form
                  className="flex min-w-0 flex-1 flex-wrap items-center gap-2"
                  onSubmit={(event) => {
                    event.preventDefault();
                    void send(`/${view.id}`, 'PATCH', { name: renaming.name });
                  }}
                >
                  <input
                    aria-label={`New name of ${view.name}`}
                    value={renaming.name}
                    maxLength={80}
                    required
                    onChange={({ target }) => setRenaming({ ...view, name: target.value })}
                    className={`${CONTROL_CLASS} max-w-72`}
                  />
                  <Button type="submit" disabled={busy}>
                    Save name
                  </Button>
                  <Button kind="quiet" onClick={() => setRenaming(null)}>
                    Keep the old name
                  </Button>
                </form>
              ) : (
                <>
                  <span className="min-w-0 flex-1 wrap-anywhere">
                    <TextLink href={view.query === '' ? plainHref : `${plainHref}&${view.query}`}>
                      {view.name}
                    </TextLink>
                    {view === current ? <span className="ml-2 text-note text-ink-2">shown now</span> : null}
                  </span>
                  <Button kind="quiet" onClick={() => setRenaming(view)}>
                    Rename<span className="sr-only"> {view.name}</span>
                  </Button>
                  <Button
                    kind="quiet"
                    disabled={busy}
                    onClick={() => void send(`/${view.id}`, 'DELETE', null)}
                  >
                    Delete<span className="sr-only"> {view.name}</span>
                  </Button>
                </>
              )}
            </li>
          ))}
        </ul>
      )}
      <form
        className="flex flex-wrap items-end gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          void send('', 'POST', { name, query });
        }}
      >
        <div className="grid min-w-0 flex-1 gap-1">
          <label htmlFor={id} className="text-note text-ink-2">
            Name of the view that is shown now
          </label>
          <input
            id={id}
            value={name}
            maxLength={80}
            required
            onChange={({ target }) => setName(target.value)}
            className={CONTROL_CLASS}
          />
        </div>
        <Button type="submit" disabled={busy}>
          {taken ? 'Replace view' : 'Save view'}
        </Button>
      </form>
      {failure === null ? null : (
        <p role="alert" className="text-limit">
          {failure}
        </p>
      )}
    </DialogButton>
  );
}
