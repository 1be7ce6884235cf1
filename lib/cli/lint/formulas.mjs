import path from 'node:path'

// No second copy of a formula: outside lib/science the tells of one are lint errors, each with what to do instead. The
// line goes by concept, not by a list of exceptions: drawing has distances and axis steps, the demo invents its nature.

const isIn = (file, ...folders) => folders.some((folder) => file.startsWith(`${folder}/`))
/** Rooms that draw: distances, areas and round axis steps are theirs; what is drawn is computed elsewhere. */
const draws = (file) => isIn(file, 'components/marks', 'components/charts')
/** Rooms whose scripts invent what a demo's or a simulated laboratory finds or photographs; nothing of it is shown as computed. */
const invents = (file) => isIn(file, 'lib/cli/seed', 'lib/cli/simulate', 'lib/cli/photo-check')
/** What the product is written in, lib/science aside; tools in plain modules compute nothing that is shown. */
const computesElsewhere = (file) =>
  /\.tsx?$/.test(file) && isIn(file, 'app', 'components', 'lib') && !isIn(file, 'lib/science')

const curved = ['exp', 'expm1', 'log', 'log1p', 'log2', 'pow', 'cbrt']
const measured = ['log10', 'sqrt', 'hypot']
/** Kelvin, gas constant, customary activation enthalpy, centrifuge, days of a year, milliseconds of a week. */
const constants = [273.15, 8.314, 8.314462618, 8.3144, 83.144, 1.118e-6, 0.7405, 365.25, 604_800_000]
const aggregates =
  /\b(?:avg|stddev(?:_\w+)?|variance|var_\w+|corr|covar_\w+|regr_\w+|percentile_\w+|sqrt|cbrt|ln|log|exp|power)\s*\(|\bsum\s*\([^)]*[*/]/i

const statistics =
  /^(?:mean|average|median|variance|sampleVariance|std(?:ev|Dev)|standardDeviation|linearFit|leastSquares|regression|slope|quantile|percentile)(?:Of)?$/

/** Each tell of a formula that belongs to lib/science: where it counts as one, and what to do instead. */
const tells = [
  {
    finds: {
      CallExpression: (node, file) =>
        isMember(node.callee, 'Math', draws(file) ? curved : [...curved, ...measured]) && !invents(file),
    },
    instead:
      'A root, power or logarithm of data is a formula. Give it a name in lib/science, with source and guard, and call that.',
  },
  {
    finds: {
      // Powers of ten place a decimal point; any other is a formula.
      BinaryExpression: (node, file) =>
        node.operator === '**' && node.left.value !== 10 && !draws(file) && !invents(file),
    },
    instead:
      'A power of data is a formula. Give it a name in lib/science, with source and guard, and call that.',
  },
  {
    finds: {
      BinaryExpression: (node, file) =>
        node.operator === '/' && isCount(node.right) && (!draws(file) || holdsSum(node.left)),
    },
    instead: 'A sum divided by a count is a mean. Call `mean` of lib/science/mean, which keeps its digits.',
  },
  {
    finds: {
      BinaryExpression: (node, file) =>
        node.operator === '/' &&
        isCount(node.left) &&
        node.right.value === 2 &&
        isIndex(node) &&
        !draws(file),
    },
    instead: 'The middle of a list is a median. Call `median` of lib/science/mean.',
  },
  {
    finds: {
      FunctionDeclaration: (node) => statistics.test(node.id?.name ?? ''),
      VariableDeclarator: (node) =>
        ['ArrowFunctionExpression', 'FunctionExpression'].includes(node.init?.type) &&
        statistics.test(node.id.name ?? ''),
    },
    instead:
      'A function of this name is a second copy, or will be taken for one. Call that of lib/science, or add it there.',
  },
  {
    finds: { BinaryExpression: (node, file) => isPercentage(node) && !draws(file) && !invents(file) },
    instead:
      'One measured number in percent of another is a formula. Call `percentOf` of lib/science/percent, or the concept it belongs to.',
  },
  {
    finds: {
      Literal: (node) => typeof node.value === 'number' && constants.includes(node.value),
      BinaryExpression: (node) => isWeekOfMs(node),
    },
    instead:
      'This constant belongs to a formula or a unit of lib/science. Import it, or better the function that uses it.',
  },
  {
    finds: {
      TaggedTemplateExpression: (node) =>
        isSqlTag(node.tag) && node.quasi.quasis.some((part) => aggregates.test(part.value.raw)),
      CallExpression: (node) =>
        isMember(node.callee, 'fn', ['avg']) ||
        (['fn', 'agg'].includes(nameOf(node.callee)) && aggregates.test(`${node.arguments[0]?.value}(`)),
    },
    instead:
      'A statistic in SQL is a second copy of the formula. Select the values (jsonb_agg) and give them to lib/science.',
  },
]

const nameOf = (node) => node?.name ?? node?.property?.name ?? ''
const isMember = (node, object, names) =>
  node.type === 'MemberExpression' && nameOf(node.object) === object && names.includes(node.property.name)
const isSqlTag = (tag) => nameOf(tag) === 'sql' || nameOf(tag.expression) === 'sql'
const isCount = (node) => node.type === 'MemberExpression' && ['length', 'size'].includes(node.property.name)
const isMeasured = (node) => node.type !== 'Literal'

/** Whether a number, rounded or not, says which of a list is taken. */
function isIndex(node) {
  const { parent } = node
  if (parent.type === 'MemberExpression') return parent.computed && parent.property === node
  return parent.type === 'CallExpression' && nameOf(parent.callee.object) === 'Math' && isIndex(parent)
}

/** Whether a sum made on the spot stands in an expression. */
function holdsSum(node) {
  if (node.type === 'CallExpression') return nameOf(node.callee) === 'reduce'
  return node.type === 'Identifier' ? /^(?:sum|total)/i.test(node.name) : false
}

/** 100 * a / b and a / b * 100, however they are put in brackets; a share that is shown times 100 is none. */
function isPercentage(node) {
  if (node.operator === '/' && isMeasured(node.right))
    return node.left.type === 'BinaryExpression' && node.left.operator === '*' && hasHundred(node.left)
  if (node.operator !== '*' || !hasHundred(node)) return false
  const other = node.left.value === 100 ? node.right : node.left
  return holdsRatio(other)
}

function holdsRatio(node) {
  if (node.type !== 'BinaryExpression') return false
  if (node.operator === '/') return isMeasured(node.left) && isMeasured(node.right)
  return ['+', '-'].includes(node.operator) && (holdsRatio(node.left) || holdsRatio(node.right))
}

const hasHundred = (node) => node.left.value === 100 || node.right.value === 100

/** 7 * 24 * …: weeks are told from instants in one place. */
function isWeekOfMs(node) {
  return (
    node.operator === '*' && node.left.value === 7 && node.right.value === 24 && node.parent.operator === '*'
  )
}

export const formulas = {
  meta: { type: 'problem', schema: [] },
  create(context) {
    const file = path.relative(context.cwd, context.filename).split(path.sep).join('/')
    if (!computesElsewhere(file)) return {}
    const visitors = {}
    for (const { finds, instead } of tells)
      for (const [type, isFound] of Object.entries(finds)) {
        const earlier = visitors[type]
        visitors[type] = (node) => {
          earlier?.(node)
          if (isFound(node, file)) context.report({ node, message: instead })
        }
      }
    return visitors
  },
}
