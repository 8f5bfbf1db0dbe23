import type { Verdict } from '../../core/limits/finding.ts';

/** The verdict as a disc: full is over, half is close, empty is within; a dash where no limit was set. Reads without colour. */
export function Disc({ verdict }: { verdict: Verdict | null }) {
  return (
    <svg class={`disc ${verdict ?? 'none'}`} width="12" height="12" viewBox="0 0 12 12" aria-hidden="true">
      {verdict === null ? (
        <path d="M2 6h8" stroke="currentColor" stroke-width="1.6" />
      ) : (
        <circle
          cx="6"
          cy="6"
          r="4.8"
          fill={verdict === 'over' ? 'currentColor' : 'none'}
          stroke="currentColor"
          stroke-width="1.4"
        />
      )}
      {verdict === 'close' ? <path d="M6 1.2a4.8 4.8 0 0 0 0 9.6Z" fill="currentColor" /> : null}
    </svg>
  );
}
