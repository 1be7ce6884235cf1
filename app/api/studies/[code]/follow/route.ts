import { write } from '@/lib/http/route'
import { followStudy } from '@/lib/study/commands/change-study'
import { following, studyAddress } from '@/lib/study/schema'

export const PUT = write({
  permission: 'reading.read',
  params: studyAddress,
  input: following,
  handler: ({ db, actor, params, input }) => followStudy(db, actor, params.code, input.isFollowing),
})
