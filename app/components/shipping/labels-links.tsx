import { PrintLink } from "./print-link";

/** Part labels on the papers that a shop has. `to` is where they are printed. */
export function LabelsLinks({ to }: { readonly to: string }) {
  return (
    <div className="flex flex-wrap gap-2">
      <PrintLink to={`${to}?paper=roll`}>Labels, 62 mm roll</PrintLink>
      <PrintLink to={`${to}?paper=letter`}>Letter sheets</PrintLink>
      <PrintLink to={`${to}?paper=a4`}>A4 sheets</PrintLink>
    </div>
  );
}
