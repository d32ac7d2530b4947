// Small conveniences that outlive the window (splits, theme). Never anything of the user's work.

/** What was remembered under the key, or null. A browser that forbids storage remembers nothing. */
export function recall(key: string): string | null {
  try {
    return localStorage.getItem(`holdfast.${key}`);
  } catch {
    return null;
  }
}

/** Remembers a text until the next visit, where the browser lets us. */
export function remember(key: string, text: string): void {
  try {
    localStorage.setItem(`holdfast.${key}`, text);
  } catch {
    // Storage is full or forbidden: the default comes back next time, nothing else is lost.
  }
}
