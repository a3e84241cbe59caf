import { Pending } from '../ui/pending';

/** Before anything is known, on the first load: the frame, without flashing words. */
export function FirstPending() {
  return (
    <main className="p-10">
      <Pending label="Loading Tremolode" lines={5} className="max-w-xl" />
    </main>
  );
}
