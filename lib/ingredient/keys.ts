export const ingredientsListKey = '/api/ingredients'
export const ingredientsKey = (q: string) => `/api/ingredients?q=${encodeURIComponent(q)}`
export const ingredientKey = (id: string) => `/api/ingredients/${id}`
export const ingredientFactsKey = (ids: readonly string[]) =>
  `/api/ingredients/facts?${new URLSearchParams(ids.map((id) => ['id', id]))}`
