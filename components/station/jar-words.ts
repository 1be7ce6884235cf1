export const kindWords: Record<string, string> = {
  watch: 'watch jar',
  measuring: 'measuring jar',
  spare: 'spare',
  retain: 'retain',
}
