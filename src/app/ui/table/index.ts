export { SortHeader } from './sort-header';
export { readSortOrder, sortRows, writeSortOrder, type SortOrder } from './sort-order';
