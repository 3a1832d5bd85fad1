const KEY = 'standfast.signed-as';

/** The name that new entries of the decision log carry; '' = none. */
export function signedAs(): string {
  try {
    return localStorage.getItem(KEY) ?? '';
  } catch {
    return '';
  }
}

export function signAs(name: string): void {
  try {
    localStorage.setItem(KEY, name.trim());
  } catch {
    // a browser that keeps nothing signs with nobody's name
  }
}
