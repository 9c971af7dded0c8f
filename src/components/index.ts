/** What rooms and features build with, in reading order. */
export { classes } from './classes.ts';
export { Room } from './Room.tsx';
export { Content } from './Content.tsx';
export { useWindowTitle } from './windowTitle.ts';
export { RunningHead } from './RunningHead.tsx';
export { Mark } from './Mark.tsx';
export type { Place, Section } from './RunningHead.tsx';
export { TwoColumns, Sheet, Margin, SmallHeading, Note, Tools } from './Layout.tsx';
export {
  ActButton,
  QuietButton,
  TextButton,
  ActLink,
  QuietLink,
  actClass,
  quietClass,
} from './Button.tsx';
export { Segmented } from './Segmented.tsx';
export { Field, TextField, FormFault } from './Field.tsx';
export { Seal, SealMark, sealWords } from './Seal.tsx';
export { Progress } from './Progress.tsx';
export { Empty, Loading, Fault, Stale } from './Empty.tsx';
export { ErrorBoundary } from './ErrorBoundary.tsx';
export { DataTable, tabulate } from './DataTable.tsx';
export type { Column } from './DataTable.tsx';
export { Formula, DisplayFormula, ScrollingFormula, loadTypesetting } from './Formula.tsx';
export { Prose } from './Prose.tsx';
export { RelativeTime, formatDate, formatRelative } from './RelativeTime.tsx';
export { Dialog } from './Dialog.tsx';
export { useMessages, say } from './messages.ts';
export { useShortcut } from './shortcuts.ts';
export { Key, KeyboardHelp } from './KeyboardHelp.tsx';
export { MessageLine, MessageAnnouncer } from './MessageLine.tsx';
export { ThemeChoiceControl } from './ThemeChoiceControl.tsx';
export { Hash, shortHash } from './Hash.tsx';
export { DerivationState } from './DerivationState.tsx';
export { DerivationProgress } from './DerivationProgress.tsx';
export { EventList } from './EventList.tsx';
export { ModelTable } from './ModelTable.tsx';
export { SourceText, SourceLine } from './SourceText.tsx';
export { sourceLines, sourceParts } from './sourceParts.ts';
export type { SourceKind, SourcePart } from './sourceParts.ts';
export { raised, writtenUnit } from './writtenUnit.ts';
