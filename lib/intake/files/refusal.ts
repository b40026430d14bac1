/** Why a file or a sheet of it cannot be read: caught by `readFiles` and told as a problem, never a crash. */
export class Refusal extends Error {
  constructor(
    readonly code: 'too-large' | 'unreadable',
    message: string,
    readonly sheet: string | null = null,
  ) {
    super(message);
    this.name = 'Refusal';
  }
}

export const tooLarge = (message: string, sheet: string | null = null): Refusal => new Refusal('too-large', message, sheet);
export const unreadable = (message: string, sheet: string | null = null): Refusal => new Refusal('unreadable', message, sheet);
