import { Figure } from './figure'
import { LOGO_HEIGHT, LOGO_WIDTH, logoShapes } from './logo-shapes'

/** Three jars: one stands, one leans, one lies. The name stands beside it. */
export function Logo({ className }: { className?: string }) {
  return (
    <Figure
      shapes={logoShapes()}
      view={{ x: 0, y: -LOGO_HEIGHT, width: LOGO_WIDTH, height: LOGO_HEIGHT }}
      className={className}
    />
  )
}
