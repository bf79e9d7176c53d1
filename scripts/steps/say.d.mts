export class Refusal extends Error {}
