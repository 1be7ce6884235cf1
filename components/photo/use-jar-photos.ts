'use client'

import useSWR from 'swr'
import { usePhotos } from '@/components/device/use-photos'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { fetcher } from '@/lib/http/fetcher'
import { photoKeys } from '@/lib/photo/keys'
import type { PhotoShows } from '@/lib/photo/schema'

export type JarPhoto = {
  id: string
  takenAt: string
  takenBy?: string
  pullJarId: string | null
  shows: PhotoShows
}

/** Photos of a jar, the newest first: those on the server and those still on their way; a new one says what it shows. */
export function useJarPhotos(jar: BenchJarPage, shows: PhotoShows) {
  const { data, mutate } = useSWR<JarPhoto[]>(photoKeys.ofJar(jar.study.code, jar.code), fetcher)
  const { add, onTheirWay } = usePhotos({
    url: photoKeys.add,
    fields: { pullJarId: jar.pullJarId, shows },
    about: {
      ...{ label: `Photo of jar ${jar.name}`, code: jar.code, pullJarId: jar.pullJarId },
      href: `/bench/${jar.code}`,
    },
    onSent: () => mutate(),
  })
  return { add, onTheirWay, sent: (data ?? []).toSorted((a, b) => b.takenAt.localeCompare(a.takenAt)) }
}
