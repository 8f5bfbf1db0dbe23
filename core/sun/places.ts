/** A town or city that a site can be set to. */
export type Place = {
  readonly name: string;
  /** ISO 3166 code of the country. */
  readonly country: string;
  /** State, canton or land where the country has letters for it; else empty. Tells towns of one name apart. */
  readonly region: string;
  readonly latitude_deg: number;
  readonly longitude_deg: number;
  readonly population: number;
  /** `foldName` of the name, kept so that a search need not fold a hundred thousand names. */
  readonly folded: string;
};

/** Letters that do not come apart into a plain letter and a mark. */
const PLAIN: Readonly<Record<string, string>> = {
  ß: 'ss',
  æ: 'ae',
  œ: 'oe',
  ø: 'o',
  đ: 'd',
  ð: 'd',
  þ: 'th',
  ł: 'l',
  ı: 'i',
  ħ: 'h',
  ŧ: 't',
  ŋ: 'n',
  ə: 'e',
};

/** A name as it is compared: small letters, no accents, one space or nothing between words. */
export const foldName = (name: string): string =>
  name
    .toLowerCase()
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}, ]+/gu, (other) => (/^['’ʻ‘ʼ`.]+$/.test(other) ? '' : ' '))
    .replace(/[ßæœøđðþłıħŧŋə]/g, (letter) => PLAIN[letter] ?? letter)
    .replace(/\s+/g, ' ')
    .trim();

/** How well a folded name answers a folded text: 2 it begins so, 1 one of its later words does, 0 not at all. */
function match(folded: string, wanted: string): number {
  if (folded.startsWith(wanted)) return 2;
  return folded.includes(` ${wanted}`) ? 1 : 0;
}

/**
 * Places whose name begins with a text, accents and case aside; then those with a later word that does. The largest come
 * first. A comma narrows by country or region: `bristol, gb`, `bristol, tn`.
 * @param list any order
 * @param text as typed; nothing is found for an empty one
 * @param most how many to return
 */
export function searchPlaces(list: readonly Place[], text: string, most = 12): Place[] {
  const comma = text.lastIndexOf(',');
  const wanted = foldName(comma < 0 ? text : text.slice(0, comma));
  const within = comma < 0 ? '' : foldName(text.slice(comma + 1));
  if (wanted === '') return [];
  const found: { readonly place: Place; readonly rank: number }[] = [];
  for (const place of list) {
    const rank = match(place.folded, wanted);
    if (rank === 0) continue;
    if (
      within !== '' &&
      !place.country.toLowerCase().startsWith(within) &&
      !place.region.toLowerCase().startsWith(within)
    )
      continue;
    found.push({ place, rank });
  }
  found.sort((a, b) => b.rank - a.rank || b.place.population - a.place.population || order(a.place, b.place));
  return found.slice(0, most).map(({ place }) => place);
}

/** Equal ranks fall by name, country and place, so that every host lists them alike. */
function order(a: Place, b: Place): number {
  const keys = (p: Place): string => `${p.folded} ${p.country} ${p.region}`;
  if (keys(a) !== keys(b)) return keys(a) < keys(b) ? -1 : 1;
  return a.latitude_deg - b.latitude_deg || a.longitude_deg - b.longitude_deg;
}
