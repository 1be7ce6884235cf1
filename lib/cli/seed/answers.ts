import { demoAnswers } from '@/fixtures/demo/answers'
import { newId } from '@/lib/db/id'
import { answerQuestion } from '@/lib/formula-answer/commands'
import { formulaAnswerInput } from '@/lib/formula-answer/schema'
import { getFormula } from '@/lib/formula/queries/get-formula'
import { formulaChecks } from '@/lib/formula/rules/checks'
import { targetPhOf } from '@/lib/formula/rules/target-ph'
import { daysAgo, type Filling } from './context'

/** Questions to the formulas, answered as on the page. */
export async function answerFormulas(filling: Filling): Promise<void> {
  const { liv } = filling.people
  const at = daysAgo(filling, 30, 11)
  for (const { formula: code, ...answer } of demoAnswers) {
    const formula = await getFormula(filling.db, liv, code)
    const { emulsionType, lines, steps, ground, versionId } = formula
    const checks = formulaChecks(emulsionType, lines, steps, ground, targetPhOf(formula))
    const check = checks.find((one) => one.key === answer.question)
    if (!check) throw new Error(`The demo answers a question that ${code} is not asked: ${answer.question}.`)
    const input = formulaAnswerInput.parse({
      id: newId(),
      versionId,
      askedAbout: check.askedAbout,
      ...answer,
    })
    await filling.act(liv, at, (trx) => answerQuestion(trx, liv, code, input))
  }
}
