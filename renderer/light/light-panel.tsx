import { useLayoutEffect } from 'preact/hooks';
import type { ReceptorForm } from '../../core/form/model.ts';
import type { AreaLight, BeforeAfter, NeighbourLight, PointLight } from '../../core/study/exposure-neighbours.ts';
import { receptorName } from '../state/names.ts';
import { leadOf, select } from '../state/selection.ts';
import { model } from '../state/studies.ts';
import { Choice } from '../ui/choice.tsx';
import { dayAndMonth, fixed, percent } from '../ui/format.ts';
import { moveFocus } from '../ui/move-focus.ts';
import { Progress } from '../ui/progress.tsx';
import { words } from '../words/words.ts';
import { countsTrees, isFresh, lightJob, lightShown, receptorLight, showLight, windowLight } from './light-state.ts';
import './light.css';

/** What neighbours, areas and points keep of their light, and what a window of the proposal has of it. */
export function LightPanel() {
  useLayoutEffect(showLight, []);
  const receptors = model.value?.value.receptors ?? [];
  const shown = lightShown.value;
  const job = lightJob.value;
  if (receptors.length === 0 && leadOf('window') === null) return <p class="empty-line soft">{words.light.none}</p>;
  const isStale = !isFresh((shown?.isOwn ? windowLight : receptorLight).value);
  return (
    <div class="light">
      <List receptors={receptors} />
      <div class={isStale ? 'light-figures stale' : 'light-figures'}>
        {(model.value?.value.trees.length ?? 0) > 0 ? <Trees /> : null}
        {shown === null ? null : <Figures {...shown} />}
        {job.kind === 'working' ? <Progress text={words.light.working} done={job.done} total={job.total} /> : null}
        {job.kind === 'failed' ? (
          <p class="notice" role="alert">
            {words.status.workerFailed(words.light.label, job.message)}
          </p>
        ) : null}
      </div>
    </div>
  );
}

/** The choice that the command has too: figures without crowns of trees, or with them. */
const Trees = () => (
  <Choice
    label={words.light.trees}
    options={[
      { value: 'left-out', text: words.light.withoutTrees },
      { value: 'counted', text: words.light.withTrees },
    ]}
    value={countsTrees.value ? 'counted' : 'left-out'}
    onChoose={(value) => {
      countsTrees.value = value === 'counted';
    }}
  />
);

/** What can be asked after; arrows go through it. */
function List({ receptors }: { receptors: readonly ReceptorForm[] }) {
  const chosen = lightShown.value?.isOwn === false ? lightShown.value.light.id : leadOf('receptor');
  return (
    <ul class="light-list" aria-label={words.light.list} onKeyDown={(event) => moveFocus(event, 'button')}>
      {receptors.map((r) => (
        <li key={r.id}>
          <button
            type="button"
            aria-current={r.id === chosen && leadOf('window') === null ? 'true' : undefined}
            onClick={() => select('receptor', r.id)}
          >
            <span>{receptorName(r)}</span>
            <span class="soft">{words.light.kinds[r.kind]}</span>
          </button>
        </li>
      ))}
    </ul>
  );
}

type Row = {
  readonly name: string;
  readonly figure: BeforeAfter;
  readonly write: (v: number) => string;
  readonly note?: string;
};

const share = (v: number): string => `${fixed(v * 100, 1)} %`;
const hours = (minutes: number): string => words.light.hours(fixed(minutes / 60, 1));

function rowsOf(
  light: PointLight | AreaLight,
  of: NeighbourLight,
  { isUpright, isPane }: { isUpright: boolean; isPane: boolean },
): readonly Row[] {
  const date = dayAndMonth(of.date);
  if (light.kind === 'area')
    return [{ name: words.light.share(fixed(of.hours, 0), date), figure: light.share, write: share }];
  return [
    { name: words.light.skyView, figure: light.skyView, write: (v) => fixed(v, 3) },
    { name: isUpright ? words.light.vertical : words.light.component, figure: light.skyComponent, write: share },
    { name: words.light.annual, figure: light.annual, write: share },
    { name: words.light.winter, figure: light.winter, write: share },
    {
      name: words.light.sunOn(date),
      figure: light.sunMinutes,
      write: hours,
      ...(isPane ? { note: words.light.level[light.level.after] } : {}),
    },
  ];
}

type FiguresProps = { readonly light: PointLight | AreaLight; readonly of: NeighbourLight; readonly isOwn: boolean };

function Figures({ light, of, isOwn }: FiguresProps) {
  const shapes = model.value?.value;
  const receptor = isOwn ? undefined : shapes?.receptors.find((r) => r.id === light.id);
  const isUpright = isOwn
    ? shapes?.windows.find((w) => w.id === light.id)?.tilt_deg === 90
    : receptor?.kind === 'window' || (receptor?.kind === 'point' && receptor.normal[2] === 0);
  const isPane = isOwn || receptor?.kind === 'window';
  return (
    <>
      <h3>{receptor === undefined ? words.names.window(light.id) : receptorName(receptor)}</h3>
      <table>
        <thead>
          <tr>
            <th scope="col">{words.light.figure}</th>
            {isOwn ? null : (
              <th scope="col" class="number">
                {words.light.before}
              </th>
            )}
            <th scope="col" class="number">
              {words.light.after}
            </th>
            {isOwn ? null : (
              <th scope="col" class="number">
                {words.light.kept}
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {rowsOf(light, of, { isUpright, isPane }).map(({ name, figure, write, note }) => (
            <tr key={name}>
              <th scope="row">
                {name}
                {note === undefined ? null : <span class="soft"> · {note}</span>}
              </th>
              {isOwn ? null : <td class="number">{write(figure.before)}</td>}
              <td class="number">
                <strong>{write(figure.after)}</strong>
              </td>
              {isOwn ? null : <td class="number">{percent(figure.kept)}</td>}
            </tr>
          ))}
        </tbody>
      </table>
      <p class="soft">
        {light.kind === 'area'
          ? words.light.area(fixed(0.5, 1))
          : `${isPane ? words.light.pane : words.light.point} ${words.light.how(fixed(of.openHours, 0))}`}
      </p>
      <p class="soft">{words.light.treesAre[of.trees]}</p>
    </>
  );
}
