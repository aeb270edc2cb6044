import { OverlayToaster, Position, type Toaster } from '@blueprintjs/core';

let toaster: Promise<Toaster> | undefined;
const shared = () => (toaster ??= OverlayToaster.create({ position: Position.BOTTOM_RIGHT, maxToasts: 3 }));

/** Says that something was done; screen readers are told politely. */
export async function say(message: string, undo?: () => void): Promise<void> {
  const action = undo ? { text: 'Undo', onClick: undo } : undefined;
  (await shared()).show({ message, timeout: undo ? 10_000 : 4000, ...(action ? { action } : {}) });
}

/** Says that something failed, and why. */
export async function complain(error: unknown): Promise<void> {
  const message = error instanceof Error ? error.message : 'Something went wrong.';
  (await shared()).show({ message, intent: 'danger', timeout: 9000 });
}
