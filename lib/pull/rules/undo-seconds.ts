/** So long a save can be taken back. */
export const undoSeconds = 30
