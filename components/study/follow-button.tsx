'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { sentenceOf } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { send } from '@/lib/http/fetcher'
import { studyKeys } from '@/lib/study/keys'

/** Whoever follows a study gets a mail about its flags. */
export function FollowButton({ code, isFollowing }: { code: string; isFollowing: boolean }) {
  const [follows, setFollows] = useState(isFollowing)
  const [busy, setBusy] = useState(false)

  async function press() {
    setBusy(true)
    try {
      await send(studyKeys.follow(code), 'PUT', { isFollowing: !follows })
      setFollows(!follows)
      toast(follows ? `You no longer follow ${code}` : `You follow ${code}: its flags come by mail`)
    } catch (error) {
      toast(sentenceOf(error).sentence, { isAlarm: true })
    } finally {
      setBusy(false)
    }
  }

  return (
    <Button kind="link" busy={busy} aria-pressed={follows} onClick={press}>
      {follows ? 'Following' : 'Follow'}
    </Button>
  )
}
