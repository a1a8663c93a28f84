/** The text of README.md with the real output of its examples. */
export function refresh(text: string): string;
