import type { SearchHit } from '../contract/requests.ts';
import type { Notebook } from './open.ts';

/** Characters kept on either side of a hit. */
const around = 40;
const mostHits = 100;

interface Row {
  readonly kind: SearchHit['kind'];
  readonly id: number;
  readonly title: string;
  readonly words: string;
}

/**
 * Cells, plans and sessions that hold every one of the words in their names or notes, whatever the case or accents.
 * Names count before notes; at most 100. Removed ones are left out.
 */
export function searchNotebook(notebook: Notebook, words: string): SearchHit[] {
  const wanted = fold(words).split(/\s+/u).filter(Boolean);
  if (wanted.length === 0) return [];
  const hits: { readonly hit: SearchHit; readonly inTitle: boolean }[] = [];
  for (const row of rows(notebook)) {
    const title = fold(row.title);
    const all = `${title}\n${fold(row.words)}`;
    if (!wanted.every((word) => all.includes(word))) continue;
    const { kind, id } = row;
    const hit = { kind, id, title: row.title, excerpt: excerpt(row.words, wanted) };
    hits.push({ hit, inTitle: wanted.every((word) => title.includes(word)) });
  }
  return hits
    .toSorted((a, b) => Number(b.inTitle) - Number(a.inTitle))
    .slice(0, mostHits)
    .map(({ hit }) => hit);
}

function rows(notebook: Notebook): Row[] {
  return notebook.db
    .prepare<[], Row>(
      `SELECT 'cell' AS kind, cell_id AS id, name AS title, note AS words FROM cell WHERE removed = 0
       UNION ALL
       SELECT 'plan', plan_id, plan.name, plan.note FROM plan JOIN cell USING (cell_id)
         WHERE plan.removed = 0 AND cell.removed = 0
       UNION ALL
       SELECT 'session', session_id, trim(date || ' ' || title), notes FROM session JOIN cell USING (cell_id)
         WHERE cell.removed = 0`,
    )
    .all();
}

/** Letters without accents, small: "Zürich" finds "zurich". Same length for the letters it leaves alone. */
function fold(text: string): string {
  return text.normalize('NFD').replaceAll(/\p{M}/gu, '').toLowerCase();
}

function excerpt(text: string, wanted: readonly string[]): string {
  const flat = text.replaceAll(/\s+/gu, ' ').normalize('NFC');
  const found = wanted.map((word) => fold(flat).indexOf(word)).filter((at) => at >= 0);
  const at = found.length === 0 ? 0 : Math.min(...found);
  const from = Math.max(0, at - around);
  const to = Math.min(flat.length, at + around);
  return `${from > 0 ? '…' : ''}${flat.slice(from, to)}${to < flat.length ? '…' : ''}`;
}
