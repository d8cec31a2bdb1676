import { useEffect, useEffectEvent, useId, useRef, useState, type FocusEvent } from 'react';
import { apiFetch } from '#components/live/api.ts';
import { Conflict } from '#components/ui/Conflict.tsx';
import { Icon } from '#components/ui/Icon.tsx';
import type { Criterion } from '#contract/criterion.ts';
import type { ChangedSite, Site } from '#contract/site.ts';
import { entryOf, entryText, entryWords, readEntry, readStep, sameEntry, type Entry } from './figure.ts';
import { StepChoice } from './StepChoice.tsx';
import { writeFigure, type Written } from './write-figure.ts';

interface FigureEditorProps {
  studyId: string;
  site: { siteId: string; name: string };
  criterion: Criterion;
  /** The figure as the grid shows it. */
  shown: Entry;
  /** The key that opened the editor, where one did. */
  pressed: string | null;
  onSaved: (saved: Extract<Written, { kind: 'saved' }>, entry: Entry) => void;
  /** The editor goes, and the keyboard back to the grid. */
  onLeave: () => void;
  onOpen: () => void;
}

/** Text that the key which opened the editor begins with; null to go on with what is there. */
function begun(pressed: string | null, rating: boolean): string | null {
  if (pressed === 'Delete' || pressed === 'Backspace') return '';
  const fits = rating ? /^[0-4]$/ : /^\S$/u;
  return pressed !== null && fits.test(pressed) ? pressed : null;
}

/**
 * A figure typed in the grid: "300" or "250 / 300 / 360", a rating by its steps. Enter saves, Escape leaves it as it
 * was. What cannot stand keeps its text and says why; what someone else changed meanwhile is for the person to choose.
 */
export function FigureEditor(props: FigureEditorProps) {
  const { studyId, site, criterion, onSaved, onLeave, onOpen } = props;
  // As the editor was opened on it, whatever arrives in the grid meanwhile.
  const [shown] = useState(props.shown);
  const rating = criterion.source === 'rating';
  const start = rating ? String(shown.value ?? '') : entryText(shown);
  const first = begun(props.pressed, rating);
  const [text, setText] = useState(first ?? start);
  const [message, setMessage] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [conflict, setConflict] = useState<{ current: ChangedSite; entry: Entry } | null>(null);
  // Read when the editor opens: what the edit is based on.
  const base = useRef<Promise<Site> | null>(null);
  const box = useRef<HTMLDivElement>(null);
  const noteId = useId();
  const open = useEffectEvent(() => {
    base.current = apiFetch<Site>(`/api/v1/studies/${studyId}/sites/${site.siteId}`);
    // Its failure is told when the figure is saved.
    base.current.catch(() => undefined);
    const field = box.current?.querySelector<HTMLInputElement>('input:checked, input[type="text"]');
    field?.focus();
    if (first === null) field?.select();
  });
  useEffect(() => open(), []);

  const put = async (onto: Site, entry: Entry): Promise<void> => {
    const written = await writeFigure(studyId, onto, criterion.id, entry);
    if (written.kind === 'stale') setConflict({ current: written.current, entry });
    else if (written.kind === 'refused')
      setMessage(written.error.errors[0]?.message ?? written.error.message);
    else onSaved(written, entry);
  };
  const save = async (entry: Entry): Promise<void> => {
    if (busy) return;
    if (sameEntry(entry, shown)) {
      onLeave();
      return;
    }
    setBusy(true);
    setMessage(null);
    try {
      const now = await base.current;
      if (!now) return;
      const moved = !sameEntry(entryOf(now, criterion.id), shown);
      if (moved) setConflict({ current: { ...now, changedBy: null, changedAt: null }, entry });
      else await put(now, entry);
    } catch (error) {
      setMessage(error instanceof Error ? error.message : String(error));
    } finally {
      setBusy(false);
    }
  };
  const commit = (typed: string): void => {
    const reading = rating ? readStep(typed, shown.known) : readEntry(typed, shown.known);
    if (reading.kind === 'refused') setMessage(reading.message);
    else void save(reading.entry);
  };
  const press = useEffectEvent((event: KeyboardEvent): void => {
    if (event.key === 'Escape') onLeave();
    else if (event.key === 'Enter' && event.target instanceof HTMLInputElement) commit(text);
    else return;
    event.preventDefault();
    event.stopPropagation();
  });
  // Keys belong to the editor as a whole, its choice of steps and its buttons.
  useEffect(() => {
    const element = box.current;
    const hear = (event: KeyboardEvent): void => press(event);
    element?.addEventListener('keydown', hear);
    return () => element?.removeEventListener('keydown', hear);
  }, []);
  const leave = (event: FocusEvent): void => {
    if (box.current?.contains(event.relatedTarget)) return;
    if (conflict || busy) return;
    if (text === start) onLeave();
    else commit(text);
  };
  const name = `${criterion.name} of ${site.name}`;
  if (conflict)
    return (
      <div className="fig-editor" data-wide="" ref={box}>
        <Conflict
          what={name}
          yours={entryWords(conflict.entry, criterion)}
          theirs={entryWords(entryOf(conflict.current, criterion.id), criterion)}
          by={conflict.current.changedBy ?? undefined}
          at={conflict.current.changedAt ?? undefined}
          keepTheirs={`Keep ${entryWords(entryOf(conflict.current, criterion.id), criterion)}`}
          putYours={`Put ${entryWords(conflict.entry, criterion)}`}
          onKeepTheirs={onLeave}
          onPutYours={() => {
            const { current, entry } = conflict;
            setConflict(null);
            void put(current, entry);
          }}
        />
      </div>
    );
  return (
    <div
      className="fig-editor"
      role="group"
      aria-label={`Edit ${name}`}
      tabIndex={-1}
      ref={box}
      onBlur={leave}
      data-invalid={message === null ? undefined : ''}
    >
      {rating ? (
        <StepChoice
          name={name}
          criterion={criterion}
          value={text}
          describedBy={noteId}
          onChange={setText}
          onPick={commit}
        />
      ) : (
        <span className="fig-editor-field">
          <input
            type="text"
            value={text}
            aria-label={[name, criterion.unit].filter(Boolean).join(', ')}
            aria-invalid={message !== null || undefined}
            aria-describedby={noteId}
            inputMode="decimal"
            autoComplete="off"
            readOnly={busy}
            onChange={(event) => setText(event.target.value)}
          />
          <span className="fld-unit">{criterion.unit}</span>
        </span>
      )}
      <p className="fig-editor-note" id={noteId} role={message === null ? undefined : 'alert'}>
        {message === null ? (
          rating ? (
            'Enter saves the step, Escape leaves it.'
          ) : (
            'One figure, or low / likely / high. Enter saves, Escape leaves.'
          )
        ) : (
          <>
            <Icon name="refused" size={14} /> {message}
          </>
        )}
      </p>
      <button type="button" className="fig-editor-more" onClick={onOpen}>
        Source and evidence
      </button>
    </div>
  );
}
