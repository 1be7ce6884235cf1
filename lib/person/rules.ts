// Shared with forms, so that a password is judged while it is typed as it will be by the server.
export const shortestPassword = 12
export const longestPassword = 128

/** Initials proposed from a name: "Ada van Brandt" gives AVB. */
export function proposeInitials(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const letters = words.map((word) => [...word][0] ?? '').join('')
  return letters.toUpperCase().slice(0, 4)
}
