/** A symbol as it is written: labels are set in capitals, and w is not W. */
export const SymbolLabel = ({ symbol }: { readonly symbol: string }) => (
  <i className="text-schedule tracking-normal normal-case">{symbol}</i>
);
