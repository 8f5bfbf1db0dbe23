import { signal } from '@preact/signals';
import type { Stage } from '../../core/form/model.ts';

/** What the drawings and the maps show standing. */
export const stage = signal<Stage>('after');
