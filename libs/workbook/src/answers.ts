export type {
  Choice,
  ColumnAnswer,
  ColumnRole,
  LayoutAnswers,
  Question,
  RememberedLayout,
  SheetGrid,
  WorkbookAnswers,
} from '@app/contracts';
