/**
 * The kit. React pieces; in an .astro page they are drawn on the server and send no script unless given a client:
 * directive, so the static ones (Finding, Panel, Caution, EmptyState, Notice, Tag, ButtonLink, Icon) serve there too:
 *
 *   <Finding><em>Tern Head</em> leads by 0.054.<Fragment slot="why">…</Fragment><Button slot="actions">…</Button></Finding>
 *
 * Looks are classes of src/styles, not props: `btn`, `table` (+ data-dense, data-sticky, data-hover; row states in
 * tables.css), `panel`, `caption`, `bar`, `box`, `num` (figures), `name`/`sub` (two-line cells), `chart` and the paints
 * of charts.css. Tailwind has the design's colours only (bg-sheet, text-ink-2, border-rule, …), the breakpoints
 * phone: (640 px), tablet: (1,024) and sheet: (1,280), `rounded-mark`, `shadow-lift`, and the variant night:.
 * No inline styles in what the server draws: classes, or SVG attributes (width, x, fill="var(--tint-2)").
 *
 * Forms: `const form = useContractForm(Schema, defaults)`; `<TextField label="Name" error={form.formState.errors.name}
 * {...form.register('name')} />`; numbers `<NumberField unit="km" {...form.register('perigeeKm', asTypedNumber)} />`.
 * After a refused write `showServerErrors(error, fields, form.setError)`. Several errors: `<ErrorSummary>`.
 *
 * Data: src/components/live: `useApi(address)` reads, `send(method, address, body)` writes; both throw ApiError.
 * After an autosave `announceSaved({ revision, savedAt })` brings the title block's Revision cell up to date.
 * Figures: src/contract/format.ts, always. `useFinding(text)` keeps the page's title equal to a changing finding.
 * `toast(text, undo?)` for finished actions out of view. `useStep(fn)` hears the n and p keys.
 * `useAction()` runs one action and holds its refusal. A link to a site is `/studies/{id}/sites?site={siteId}`.
 */
export { Button, ButtonLink, IconButton, type ButtonKind } from './Button.tsx';
export { Icon, type IconName } from './Icon.tsx';
export {
  Field,
  NumberField,
  Select,
  TextArea,
  TextField,
  messageOf,
  type Choice,
  type FieldError,
  type FieldLooks,
} from './Field.tsx';
export { Checkbox, Radio, Switch } from './Check.tsx';
export { asTypedNumber, showServerErrors, summaryLines, useContractForm } from './form.ts';
export { ErrorSummary, type SummaryLine } from './ErrorSummary.tsx';
export { Finding, Panel } from './Finding.tsx';
export { Caution, EmptyState, KeyLetter, NoFigure, Notice, Progress, Stale, Tag } from './States.tsx';
export { TableScroll } from './TableScroll.tsx';
export { ConfirmDialog, Dialog } from './Dialog.tsx';
export { SideSheet } from './SideSheet.tsx';
export { ToastRegion, toast } from './Toast.tsx';
export { Menu } from './Menu.tsx';
export { Conflict } from './Conflict.tsx';
export { Segmented, type Segment } from './Segmented.tsx';
export { Tabs, type Tab } from './Tabs.tsx';
export { Chart, ChartPatterns, PART_LETTERS, XAxis, YAxis, partPaint } from './chart.tsx';
