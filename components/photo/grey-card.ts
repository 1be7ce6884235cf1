'use client'

import { useState } from 'react'
import { useKept } from '@/components/device/use-kept'
import { dayText } from '@/lib/report/rules'
import { greyCardL } from '@/lib/science/photo-colour'

type Card = { text: string; usedAt: string }
const none: Card = { text: '', usedAt: '' }

/** The L* of a grey card belongs to the card: this person's last one stays on the device, and says where it is from. */
export function useGreyCard() {
  const [kept, keep] = useKept<Card>('grey card', none)
  const [typed, setTyped] = useState<string | null>(null)
  const text = typed ?? (kept.text || String(greyCardL))
  const isKept = text === kept.text
  return {
    text,
    type: setTyped,
    origin: isKept
      ? `Of your card, as you used it last on ${dayText(kept.usedAt)}. Type it anew for another card.`
      : `${greyCardL} is a card that reflects 18 %. Its maker’s figure is better, and is kept for the next time.`,
    /** Only what a colour was told by; what is half typed is not the card's. */
    keep: () => keep({ text, usedAt: new Date().toISOString() }),
  }
}
