import {
  mdiAlert,
  mdiAlertCircle,
  mdiArrowUp,
  mdiCheck,
  mdiCheckCircle,
  mdiChevronDoubleLeft,
  mdiChevronDoubleRight,
  mdiChevronDown,
  mdiChevronLeft,
  mdiChevronRight,
  mdiChevronUp,
  mdiCloseCircle,
  mdiExclamation,
  mdiInformation,
  mdiMenuDown,
} from '@quasar/extras/mdi-v7';

/** The icons that the parts in use draw by themselves; a whole set has a hundred more. */
export const icons = {
  name: 'tarewell',
  type: {
    positive: mdiCheckCircle,
    negative: mdiAlert,
    info: mdiInformation,
    warning: mdiExclamation,
  },
  arrow: { dropdown: mdiMenuDown },
  chip: { remove: mdiCloseCircle, selected: mdiCheck },
  expansionItem: { icon: mdiChevronDown, denseIcon: mdiMenuDown },
  field: { clear: mdiCloseCircle, error: mdiAlertCircle },
  pagination: {
    first: mdiChevronDoubleLeft,
    prev: mdiChevronLeft,
    next: mdiChevronRight,
    last: mdiChevronDoubleRight,
  },
  table: {
    arrowUp: mdiArrowUp,
    warning: mdiAlert,
    firstPage: mdiChevronDoubleLeft,
    prevPage: mdiChevronLeft,
    nextPage: mdiChevronRight,
    lastPage: mdiChevronDoubleRight,
  },
  tabs: { left: mdiChevronLeft, right: mdiChevronRight, up: mdiChevronUp, down: mdiChevronDown },
};
