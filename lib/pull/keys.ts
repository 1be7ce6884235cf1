export const pullKeys = {
  /** Planned pulls on days on which the lab does not work, and where they go. */
  moves: '/api/pulls/moves',
  open: (pullJarId: string) => `/api/pulls/${pullJarId}/open`,
  takeOut: (pullJarId: string) => `/api/pulls/${pullJarId}/take-out`,
  undo: (pullJarId: string) => `/api/pulls/${pullJarId}/undo`,
  /** What follows from a jar that was not read, and the jars that could take its place. */
  standIn: (pullJarId: string) => `/api/pulls/${pullJarId}/stand-in`,
  readings: (pullJarId: string) => `/api/pulls/${pullJarId}/readings`,
}
