/** What a reading was read by, where its detail tells: a ruler, or a photo that was marked. */
export function howRead({
  attribute,
  detail,
}: {
  attribute: string
  detail: Record<string, unknown>
}): string | null {
  if (detail['photoLines']) return 'lines on a photo'
  if (detail['photoColour']) return 'colour from a photo, an estimate'
  if (detail['photoDrops']) return 'drops on a photo'
  if (detail['isEstimate']) return 'an estimate'
  const hasHeight = [detail['topMm'], detail['bottomMm']].some((mm) => typeof mm === 'number' && mm > 0)
  return attribute === 'separation' && hasHeight && !detail['isUnderRuler'] ? 'with a ruler' : null
}
