type Subject = 'draft' | 'outbox' | 'sent'
type Message = { subject: Subject; text: string }

export type Tabs = ReturnType<typeof speakToTabs>

/** The other tabs of this browser in which the same person has the notebook open. */
export function speakToTabs(personId: string) {
  const channel =
    typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(`stillstand.${personId}`)
  return {
    tell(subject: Subject, text: string): void {
      channel?.postMessage({ subject, text } satisfies Message)
    },
    listen(subject: Subject, hear: (text: string) => void): void {
      channel?.addEventListener('message', ({ data }: MessageEvent<Message>) => {
        if (data.subject === subject) hear(data.text)
      })
    },
  }
}
