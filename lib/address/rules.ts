/**
 * An address that the framework can read. One whose percent signs stand for nothing makes it fail before any page or route
 * is asked; there each sign is meant as itself, so that what is not found says so.
 */
export function readablePath(address: string): string {
  const end = address.search(/[?#]/)
  const path = end < 0 ? address : address.slice(0, end)
  return path.split('/').map(readable).join('/') + address.slice(path.length)
}

// What is read as it is written has no percent sign, or one that stands for nothing.
function readable(segment: string): string {
  return readSegment(segment) === segment ? segment.replaceAll('%', '%25') : segment
}

/** What a part of an address says; as it is written where its percent signs stand for nothing that a text can hold. */
export function readSegment(written: string): string {
  try {
    const said = decodeURIComponent(written)
    return said.includes('\0') ? written : said
  } catch {
    return written
  }
}
