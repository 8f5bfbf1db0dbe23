import { compareWords } from './compare.ts';
import { factsWords } from './facts.ts';
import { findingsWords } from './findings.ts';
import { frameWords } from './frame.ts';
import { lightWords } from './light.ts';
import { mapsWords } from './maps.ts';
import { limitsWords } from './limits.ts';
import { massingWords } from './massing.ts';
import { momentWords } from './moment.ts';
import { namesWords } from './names.ts';
import { placeWords } from './place.ts';
import { scheduleWords } from './schedule.ts';
import { sheetsWords } from './sheets.ts';
import { sizingWords } from './sizing.ts';
import { startWords } from './start.ts';
import { sunPathWords } from './sun-path.ts';
import { weatherWords } from './weather.ts';
import { yearStripWords } from './year-strip.ts';

/** Every word of the desk, a file for each part of it, so that it can be translated. Numbers are formatted by ui/format.ts before they come here. */
export const words = {
  ...frameWords,
  ...startWords,
  ...lightWords,
  ...mapsWords,
  ...limitsWords,
  ...massingWords,
  ...momentWords,
  ...namesWords,
  ...scheduleWords,
  ...yearStripWords,
  ...sunPathWords,
  ...placeWords,
  ...weatherWords,
  ...factsWords,
  ...findingsWords,
  ...compareWords,
  ...sheetsWords,
  ...sizingWords,
} as const;
