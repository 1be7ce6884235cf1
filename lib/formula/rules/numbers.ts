import { grouped } from '@/lib/number/rules'

/** 2400 -> "2.40", 2405 -> "2.405". */
export function percentText(thousandths: number): string {
  return (thousandths / 1000).toFixed(thousandths % 10 === 0 ? 2 : 3)
}

export function moneyText(cents: number): string {
  return grouped(cents / 100, 2)
}
