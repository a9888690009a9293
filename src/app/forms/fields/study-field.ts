import type { FormlyFieldConfig, FormlyFieldProps } from '@ngx-formly/core';
import { formatPath, type PathPart, type Study } from '../../../../shared/contracts';
import { valueAt, withValueAt } from '../values/at-path';

/** What a field holds: a number or expression, a text, a choice, a tick, or nothing. */
export type FieldValue = string | number | boolean | undefined;

/** How a field's value stands in the study. Neither side changes the study it is given. */
export interface Lens {
  readonly read: (study: Study) => FieldValue;
  readonly write: (study: Study, value: FieldValue) => Study;
}

export interface FieldOption {
  readonly value: string;
  readonly label: string;
}

export interface StudyProps extends FormlyFieldProps {
  readonly symbol?: string;
  readonly unit?: string;
  /** Where faults of this field stand; left out where it has none of its own. */
  readonly path?: string;
  readonly lens?: Lens;
  readonly optional?: boolean;
  readonly choices?: readonly FieldOption[];
  /** The value takes the whole width beside the label. */
  readonly wide?: boolean;
  /** An angle: degrees are shown beside it, and understood. */
  readonly angle?: boolean;
  /** What a button does to the study. */
  readonly act?: (study: Study) => Study;
  readonly head?: string;
  readonly rowNames?: readonly string[];
  readonly columnNames?: readonly string[];
  readonly hint?: string;
}

export type StudyField = FormlyFieldConfig<StudyProps>;

/** The value at a path of the study, as it is. */
export function lensAt(path: readonly PathPart[]): Lens {
  return {
    read: (study) => valueAt(study, path) as FieldValue,
    write: (study, value) => withValueAt(study, path, value),
  };
}

/** A key that may be left out together with the object that would be empty without it. */
export function optionalLensAt(path: readonly PathPart[], parent: readonly PathPart[]): Lens {
  const { read, write } = lensAt(path);
  return {
    read,
    write: (study, value) => {
      const written = write(study, value);
      const rest = valueAt(written, parent);
      return value === undefined &&
        typeof rest === 'object' &&
        rest !== null &&
        Object.keys(rest).length === 0
        ? withValueAt(written, parent, undefined)
        : written;
    },
  };
}

function field(
  type: string,
  path: readonly PathPart[],
  props: StudyProps,
  lens = lensAt(path),
  wrappers: string[] = ['study-row'],
): StudyField {
  const at = formatPath(path);
  // As a list of one, Formly takes the key as it is and looks for no path in it.
  return { key: [at], type, wrappers, props: { path: at, lens, ...props } };
}

/** A number or expression; without one the study keeps an empty text, which is a fault that shows at the field. */
export function scalarField(path: readonly PathPart[], props: StudyProps): StudyField {
  const { read, write } = lensAt(path);
  return field('study-scalar', path, props, { read, write: (study, value) => write(study, value ?? '') });
}

export function optionalScalarField(
  path: readonly PathPart[],
  props: StudyProps,
  lens = lensAt(path),
): StudyField {
  return field('study-scalar', path, { ...props, optional: true }, lens);
}

/** An entry of a matrix or vector: no row of its own. */
export function entryField(path: readonly PathPart[], label: string): StudyField {
  return { ...scalarField(path, { label }), wrappers: [] };
}

export function textField(path: readonly PathPart[], props: StudyProps, lens = lensAt(path)): StudyField {
  return field('study-text', path, { wide: true, ...props }, lens);
}

export function choiceField(path: readonly PathPart[], props: StudyProps, lens = lensAt(path)): StudyField {
  return field('study-choice', path, { wide: true, ...props }, lens);
}

/** A button; it has no value. */
export function actField(label: string, act: (study: Study) => Study): StudyField {
  return { type: 'study-act', props: { label, act } };
}

/** Fields under a small heading. */
export function groupField(head: string, fieldGroup: StudyField[], hint?: string): StudyField {
  return { type: 'study-group', props: { head, ...(hint === undefined ? {} : { hint }) }, fieldGroup };
}

/** Entries in rows and columns, with their values at the nominal point beside them. */
export function gridField(
  head: string,
  path: readonly PathPart[],
  rows: readonly string[],
  columns: readonly string[],
  entryPath: (row: number, column: number) => readonly PathPart[],
): StudyField {
  return {
    type: 'study-grid',
    props: { head, rowNames: rows, columnNames: columns, path: formatPath(path) },
    fieldGroup: rows.flatMap((rowName, row) =>
      columns.map((columnName, column) =>
        entryField(entryPath(row, column), `${head}, ${rowName}, ${columnName}`.replace(/, , /g, ', ')),
      ),
    ),
  };
}
