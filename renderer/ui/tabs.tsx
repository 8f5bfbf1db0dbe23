import { moveFocus } from './move-focus.ts';

export type Tab<T extends string> = { readonly value: T; readonly text: string; readonly count?: number | undefined };

type Props<T extends string> = {
  readonly label: string;
  readonly tabs: readonly Tab<T>[];
  readonly value: T;
  readonly panelId: string;
  readonly onChoose: (value: T) => void;
};

export function Tabs<T extends string>({ label, tabs, value, panelId, onChoose }: Props<T>) {
  return (
    <div class="tabs" role="tablist" aria-label={label} onKeyDown={(event) => moveFocus(event, '[role="tab"]')}>
      {tabs.map((tab) => (
        <button
          key={tab.value}
          type="button"
          role="tab"
          aria-selected={tab.value === value}
          aria-controls={panelId}
          tabIndex={tab.value === value ? 0 : -1}
          onClick={() => onChoose(tab.value)}
        >
          {tab.text}
          {tab.count === undefined ? null : <span class="count">{tab.count}</span>}
        </button>
      ))}
    </div>
  );
}
