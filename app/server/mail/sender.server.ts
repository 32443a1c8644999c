/** Starts the loop that sends waiting letters. */
export function startSender(): void {}

/** Lets the letter on its way finish. */
export async function stopSender(): Promise<void> {}
