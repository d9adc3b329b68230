export class BetaController {}
