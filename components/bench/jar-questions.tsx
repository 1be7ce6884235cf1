import { AskAgain, TwoPeople } from '@/components/bench/answers'
import type { BenchPerson } from '@/components/device/last-person'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Props = { jar: BenchJarPage; person: BenchPerson; entry: JarEntry }

/** What the server asks back before it keeps the jar. */
export function JarQuestions({ jar, person, entry }: Props) {
  const { asked, twice, entries, isBusy } = entry
  return (
    <>
      {asked ? (
        <AskAgain
          refusal={asked}
          onConfirm={() =>
            void entry.save({
              confirmed: entries.map((e) => `${e.attribute}.${e.replicate}`),
              leaveOut: jar.fields
                .map((f) => f.attribute)
                .filter((attribute) => !entries.some((e) => e.attribute === attribute)),
            })
          }
          onAgain={entry.askNoMore}
          isBusy={isBusy}
        />
      ) : null}
      {twice ? (
        <TwoPeople
          jar={jar}
          person={person}
          theirs={twice}
          mine={entries}
          isBusy={isBusy}
          onDecide={(resolution) => void entry.save({ resolution, version: twice.version })}
          onClose={entry.decideLater}
        />
      ) : null}
    </>
  )
}
