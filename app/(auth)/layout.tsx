import type { ReactNode } from 'react'
import { JarStory } from '@/components/session/jar-story'

/** What can be opened without being signed in stands on the bare page. */
export default function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="flex min-h-dvh flex-col">
      {children}
      <footer>
        <JarStory />
      </footer>
    </div>
  )
}
