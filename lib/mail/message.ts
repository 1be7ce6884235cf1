/** Reads what our own sender writes: one text part in base64, subjects as RFC 2047 words. */
export function parseMessage(raw: string): {
  messageId: string
  from: string
  subject: string
  text: string
} {
  const [head = '', ...rest] = raw.split(/\r?\n\r?\n/)
  const headers = new Map<string, string>()
  for (const line of head.replace(/\r?\n[ \t]+/g, ' ').split(/\r?\n/)) {
    const colon = line.indexOf(':')
    if (colon > 0) headers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim())
  }
  const body = rest.join('\n\n')
  const isBase64 = (headers.get('content-transfer-encoding') ?? '').toLowerCase() === 'base64'
  return {
    messageId: headers.get('message-id') ?? raw,
    from: decodeWords(headers.get('from') ?? ''),
    subject: decodeWords(headers.get('subject') ?? ''),
    text: isBase64 ? Buffer.from(body, 'base64').toString('utf8') : body,
  }
}

function decodeWords(text: string): string {
  return text
    .replace(/\?=\s+=\?/g, '?==?')
    .replace(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_, encoding: string, word: string) =>
      encoding.toLowerCase() === 'b' ? Buffer.from(word, 'base64').toString('utf8') : decodeQ(word),
    )
}

function decodeQ(word: string): string {
  const bytes = word
    .replaceAll('_', ' ')
    .replace(/=([0-9a-f]{2})/gi, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)))
  return Buffer.from(bytes, 'latin1').toString('utf8')
}
