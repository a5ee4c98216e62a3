export function ledgerTable(cases: readonly unknown[]): string;
export function withTable(readme: string, cases: readonly unknown[]): string;
