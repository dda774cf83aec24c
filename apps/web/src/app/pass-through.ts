import type { PrimeReactPTOptions } from 'primereact/api';

/** The class names of theme/component.css for what we use of PrimeReact, which brings no style of its own. */
export const passThrough: PrimeReactPTOptions = {
  inputtext: { root: { className: 'input' } },
  inputtextarea: { root: { className: 'input input--area' } },
  password: {
    root: { className: 'password' },
    input: { className: 'input' },
    showIcon: { className: 'password__toggle' },
    hideIcon: { className: 'password__toggle' },
  },
  dropdown: {
    root: { className: 'select' },
    input: { className: 'select__value' },
    trigger: { className: 'select__trigger' },
    panel: { className: 'select__panel' },
    wrapper: { className: 'select__list-box' },
    list: { className: 'select__list' },
    item: (options) => ({
      className: `select__item${options?.context.selected === true ? ' select__item--chosen' : ''}${options?.context.focused === true ? ' select__item--focused' : ''}`,
    }),
  },
  dialog: {
    mask: { className: 'dialog__mask' },
    root: { className: 'dialog' },
    header: { className: 'dialog__head' },
    headerTitle: { className: 'dialog__title' },
    closeButton: { className: 'dialog__close' },
    content: { className: 'dialog__body' },
    footer: { className: 'dialog__foot' },
  },
  toast: {
    root: { className: 'toasts' },
    message: { className: 'toast' },
    content: { className: 'toast__content' },
    text: { className: 'toast__text' },
    icon: { className: 'toast__icon' },
    summary: { className: 'toast__summary' },
    detail: { className: 'toast__detail' },
    closeButton: { className: 'toast__close' },
  },
  datatable: {
    root: { className: 'table' },
    wrapper: { className: 'table__wrap' },
    table: { className: 'table__table' },
    thead: { className: 'table__head' },
    tbody: { className: 'table__rows' },
    bodyRow: { className: 'table__row' },
    column: {
      headerCell: { className: 'table__head-cell' },
      headerContent: { className: 'table__head-content' },
      sort: { className: 'table__sort' },
      bodyCell: { className: 'table__cell' },
    },
  },
};
