import { useEffect, useRef, useState } from 'preact/hooks';
import type { Document, Page } from '../../core/sheet/drawing.ts';
import { DrawingView } from '../ui/drawing-view.tsx';
import { useSize } from '../ui/use-size.ts';
import { words } from '../words/words.ts';

/** A millimetre on a screen that shows 96 dots an inch [px]. */
const PX_A_MM = 96 / 25.4;
/** Left free around a page [px]. */
const ROUND = 36;

export type Zoom = 'fit' | 'actual';

type Props = {
  readonly document: Document;
  readonly zoom: Zoom;
  readonly onInView: (index: number) => void;
};

/** The pages one under the other, as they will lie on paper. Those far from view keep their place and are not drawn. */
export function SheetPages({ document, zoom, onInView }: Props) {
  const { ref, width, height } = useSize<HTMLDivElement>();
  const { pages } = document;
  const [first] = pages;
  if (first === undefined) return null;
  const fit = Math.min((width - ROUND) / first.width, (height - ROUND) / first.height);
  const scale = zoom === 'actual' ? PX_A_MM : Math.max(0.4, fit);
  return (
    // A scrolling region must be reachable, so that it can be scrolled by keyboard.
    // biome-ignore lint/a11y/noNoninteractiveTabindex: see above
    <section class="sheet-pages" ref={ref} tabIndex={0} aria-label={words.sheets.preview}>
      {width === 0
        ? null
        : pages.map((page, i) => (
            <OnePage
              key={`${i} ${page.title}`}
              page={page}
              label={words.sheets.page(i + 1, pages.length, page.title)}
              width={page.width * scale}
              onInView={() => onInView(i)}
            />
          ))}
    </section>
  );
}

type OneProps = {
  readonly page: Page;
  readonly label: string;
  readonly width: number;
  readonly onInView: () => void;
};

function OnePage({ page, label, width, onInView }: OneProps) {
  const place = useRef<HTMLDivElement>(null);
  const [isNear, setNear] = useState(false);
  const tell = useRef(onInView);
  tell.current = onInView;
  useEffect(() => {
    const element = place.current as HTMLDivElement;
    const near = new IntersectionObserver(([entry]) => setNear(entry?.isIntersecting ?? false), {
      rootMargin: '800px',
    });
    const seen = new IntersectionObserver(
      ([entry]) => {
        if (entry?.isIntersecting) tell.current();
      },
      { rootMargin: '-45% 0px -45% 0px' },
    );
    near.observe(element);
    seen.observe(element);
    return () => {
      near.disconnect();
      seen.disconnect();
    };
  }, []);
  const height = (width * page.height) / page.width;
  return (
    <div class="sheet-page" ref={place}>
      {isNear ? (
        <DrawingView page={page} label={label} width={width} />
      ) : (
        <svg class="drawing" width={width} height={height} role="img" aria-label={label} />
      )}
    </div>
  );
}
