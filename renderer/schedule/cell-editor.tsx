import { useLayoutEffect, useRef } from 'preact/hooks';
import type { CellEdit } from './cell-edit.ts';

type Props<Row> = {
  readonly edit: CellEdit<Row>;
  readonly label: string;
  /** What stands in it at first: the cell's own text, or the key that began the editing. */
  readonly begin: string;
  readonly isTyped: boolean;
  readonly onTake: (text: string, then: 'down' | 'stay' | 'right' | 'left') => void;
  readonly onGiveUp: () => void;
};

/** The cell while it is changed: Enter takes it and goes down, Tab to the side, Escape gives up; leaving it takes it. */
export function CellEditor<Row>({ edit, label, begin, isTyped, onTake, onGiveUp }: Props<Row>) {
  const ref = useRef<HTMLInputElement & HTMLSelectElement>(null);
  const isOver = useRef(false);
  useLayoutEffect(() => {
    const field = ref.current as HTMLInputElement & HTMLSelectElement;
    field.focus();
    if (edit.kind === 'choice') return;
    // A key that began the editing is gone on from; what stood there is replaced by what is typed.
    if (isTyped) field.setSelectionRange(begin.length, begin.length);
    else field.select();
  }, []);
  const end = (then: 'down' | 'stay' | 'right' | 'left' | null): void => {
    if (isOver.current) return;
    isOver.current = true;
    if (then === null) onGiveUp();
    else onTake((ref.current as HTMLInputElement).value, then);
  };
  const press = (event: KeyboardEvent): void => {
    event.stopPropagation();
    const then = { Enter: 'down', Tab: event.shiftKey ? 'left' : 'right', Escape: null }[event.key] as
      | 'down'
      | 'right'
      | 'left'
      | null
      | undefined;
    if (then === undefined) return;
    event.preventDefault();
    end(then);
  };
  const shared = {
    ref,
    class: 'cell-editor',
    'aria-label': label,
    onKeyDown: press,
    onBlur: () => end('stay'),
    onClick: (event: Event) => event.stopPropagation(),
  };
  if (edit.kind !== 'choice') return <input type="text" {...shared} defaultValue={begin} />;
  return (
    <select {...shared} defaultValue={begin}>
      {edit.options?.map(([value, name]) => (
        <option key={value} value={value} selected={value === begin}>
          {name}
        </option>
      ))}
    </select>
  );
}
