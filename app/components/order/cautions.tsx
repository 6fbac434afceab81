/** What must be known before the parts are taken in hand. */
export function Cautions() {
  return (
    <ul className="list-disc space-y-1 pl-4 text-small text-soft">
      <li>Cut edges are sharp: wear gloves to carry the parts.</li>
      <li>Panels are heavy: lift long ones in pairs.</li>
      <li>Sanding dust harms the lungs: wear a mask, and clear the dust away.</li>
      <li>Cabinets in boats and vehicles must be anchored to the structure.</li>
      <li>
        Gas, electrical and structural work follows local codes and belongs to licensed people. Strength and
        fitness of the design stay with you.
      </li>
    </ul>
  );
}
