// UUID version 7 (RFC 9562): milliseconds, then a counter within the millisecond, then chance.
// Made with getRandomValues because crypto.randomUUID is missing on plain http.
let lastTime = 0
let counter = 0

export function newId(): string {
  const random = crypto.getRandomValues(new Uint8Array(10))
  const time = Date.now()
  if (time > lastTime) {
    lastTime = time
    counter = ((random[0]! << 8) | random[1]!) & 0x7ff
  } else if (++counter > 0xfff) {
    lastTime += 1
    counter = 0
  }
  const variant = (random[2]! & 0x3f) | 0x80
  const tail = [variant, ...random.subarray(3)].map((byte) => byte.toString(16).padStart(2, '0')).join('')
  const head = lastTime.toString(16).padStart(12, '0')
  return `${head.slice(0, 8)}-${head.slice(8)}-7${counter.toString(16).padStart(3, '0')}-${tail.slice(0, 4)}-${tail.slice(4)}`
}
