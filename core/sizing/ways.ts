import type { Finding, Verdict } from '../limits/finding.ts';
import type { SchemeEdit } from '../scheme/edit.ts';
import type { LeverKind } from './lever.ts';
import type { Price } from './room-probe.ts';
import type { Around } from './room-trials.ts';

/** What a result rests on: its value were the trees or the neighbours not there. */
export type RestsOn = {
  readonly on: Exclude<Around, 'everything'>;
  readonly value: number;
  readonly verdict: Verdict | null;
};

/** The smallest change of one lever that brings a room within. */
export type WayThatPasses = {
  readonly passes: true;
  readonly lever: LeverKind;
  /** The windows it is done to: the one that brings most, or all of the room where that one does not suffice. */
  readonly windows: readonly string[];
  readonly amount: number;
  readonly unit: string;
  /** In a few words: what is done. */
  readonly text: string;
  readonly edit: SchemeEdit;
  /** The finding once it is done. */
  readonly after: Finding;
  /** Another limit that the room is over too, and for which so much of the change is needed; null where it is the finding's own. */
  readonly decidedBy: Finding | null;
  readonly price: Price;
  /** What the pass rests on; empty when neither trees nor neighbours change it. */
  readonly restsOn: readonly RestsOn[];
};

/** A lever that cannot do it by itself, and why. */
export type WayThatFails = {
  readonly passes: false;
  readonly lever: LeverKind;
  readonly windows: readonly string[];
  readonly reason: string;
  /** What is left at the furthest it goes; null when it cannot be done at all. */
  readonly best: { readonly amount: number; readonly unit: string; readonly value: number } | null;
};

export type Way = WayThatPasses | WayThatFails;

/** Everything that can be said about bringing a room that is over a limit within all of its limits. */
export type Ways = {
  readonly finding: Finding;
  /** As it is now. */
  readonly price: Price;
  readonly restsOn: readonly RestsOn[];
  readonly ways: readonly Way[];
};
