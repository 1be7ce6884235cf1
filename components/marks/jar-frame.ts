/** Every length of a jar that stands `height` high, its foot's middle at 0, 0 and y running down. */
export type JarFrame = {
  height: number
  halfWidth: number
  wall: number
  lidHeight: number
  lidHalfWidth: number
  footRadius: number
  fillTop: number
  fillBottom: number
  /** The inside of the glass. */
  halfInside: number
  insideRadius: number
  /** The middle of the glass, where its stroke runs. */
  halfGlass: number
  glassFoot: number
}

export function jarWall(height: number): number {
  if (height < 24) return 1.2
  if (height < 40) return 1.5
  if (height < 60) return 1.75
  return Math.min(5, Math.max(2.25, height * 0.02))
}

export function jarFrame(height: number): JarFrame {
  const wall = jarWall(height)
  const halfWidth = height * 0.3
  const lidHeight = height * 0.115
  const footRadius = Math.max(1.5, height * 0.054)
  return {
    height,
    halfWidth,
    wall,
    lidHeight,
    lidHalfWidth: height * 0.312,
    footRadius,
    fillTop: -(height - lidHeight - height * 0.05),
    fillBottom: -wall,
    halfInside: halfWidth - wall,
    insideRadius: footRadius - wall / 2,
    halfGlass: halfWidth - wall / 2,
    glassFoot: -wall / 2,
  }
}
