/** Where somebody is taxed and under which number. */
export interface TaxParty {
  readonly country: string;
  readonly vatNumber: string | null;
}
