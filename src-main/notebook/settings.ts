import type { Notebook } from './open.ts';

type SettingName = 'open plan';

/** The setting's value, or null. */
export function setting(notebook: Notebook, name: SettingName): string | null {
  const read = notebook.db.prepare<[string], { value: string }>('SELECT value FROM setting WHERE name = ?');
  return read.get(name)?.value ?? null;
}

/** Runs inside the caller's `change`. */
export function keepSetting(notebook: Notebook, name: SettingName, value: string): void {
  notebook.db
    .prepare('INSERT INTO setting (name, value) VALUES (?, ?) ON CONFLICT DO UPDATE SET value = excluded.value')
    .run(name, value);
}
