/**
 * One drawing description for paper and screen: everything in millimetres on the page, origin at the top left, y down.
 * PDF, SVG and PNG are printed from it; a golden file of it tests them all.
 */
export type Mm = number;
/** #rrggbb */
export type Colour = string;

export type Stroke = { readonly colour: Colour; readonly width: Mm; readonly dash?: readonly Mm[] };
/** Lines at an angle [°, anticlockwise from +x] and a spacing, which survive a black-and-white printer. */
export type Hatch = { readonly angle_deg: number; readonly spacing: Mm; readonly stroke: Stroke };

export type Face = 'regular' | 'semibold' | 'italic';

export type Mark =
  | {
      readonly kind: 'path';
      /** Closed or open runs of points; several closed runs are filled even-odd. */
      readonly runs: readonly (readonly (readonly [Mm, Mm])[])[];
      readonly closed: boolean;
      readonly fill?: Colour;
      readonly hatch?: Hatch;
      readonly stroke?: Stroke;
    }
  | {
      readonly kind: 'circle';
      readonly at: readonly [Mm, Mm];
      readonly radius: Mm;
      readonly fill?: Colour;
      readonly stroke?: Stroke;
    }
  | {
      readonly kind: 'text';
      readonly text: string;
      readonly at: readonly [Mm, Mm];
      /** Height of the em [mm]; capitals of the house face are 0.698 of it. */
      readonly size: Mm;
      readonly face: Face;
      readonly colour: Colour;
      readonly anchor: 'start' | 'middle' | 'end';
      /** Degrees anticlockwise about `at`. */
      readonly turn_deg?: number;
      /** Tabular figures. */
      readonly tabular?: boolean;
      /** Right-to-left text. */
      readonly rtl?: boolean;
    }
  | {
      readonly kind: 'group';
      readonly clip?: readonly [Mm, Mm, Mm, Mm];
      /** What the group shows: its words for those who do not see it. */
      readonly label?: string;
      /** What it is where it is no figure: lines of text, or a table's head, row or cell. */
      readonly role?: 'text' | 'head' | 'row' | 'cell';
      readonly marks: readonly Mark[];
    };

/** One page. `title` becomes its bookmark. */
export type Page = { readonly width: Mm; readonly height: Mm; readonly title: string; readonly marks: readonly Mark[] };

export type Document = {
  readonly title: string;
  readonly author: string;
  /** BCP 47, such as en-GB. */
  readonly language: string;
  readonly pages: readonly Page[];
};

/** ISO 216 sizes, portrait [mm]. */
export const PAPER: { readonly [name: string]: readonly [Mm, Mm] } = {
  A4: [210, 297],
  A3: [297, 420],
  A2: [420, 594],
  A1: [594, 841],
};
