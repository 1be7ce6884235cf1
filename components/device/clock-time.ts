/** "08:12", or with its day where that is another one. */
export function clockTime(at: string): string {
  const when = new Date(at)
  const time = when.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })
  if (when.toDateString() === new Date().toDateString()) return time
  return `${time}, ${when.toLocaleDateString('en-GB', { day: 'numeric', month: 'short' })}`
}
