export type {
  Choice,
  ColumnAnswer,
  ValueAnswer,
  ColumnRole,
  LayoutAnswers,
  Question,
  RememberedLayout,
  SheetGrid,
  WorkbookAnswers,
} from '@app/contracts';
