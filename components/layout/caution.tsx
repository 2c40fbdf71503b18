import { Notice } from "@/components/ui/notice";

/** What advice is not. Stands wherever advice is read. */
export function Caution({ className }: { className?: string }) {
  return (
    <Notice tone="warn" title="An estimate, not a guarantee" {...(className === undefined ? {} : { className })}>
      <p>Times, iterations and memory come from models and from past runs. Your run may differ, and the ranges say by how much it usually does.</p>
      <p>
        A converged linear solve does not show that the model or the mesh is right. Where people rely on the result, as in underground storage, contamination or structures, verify the
        discretisation and follow the codes and licensed practice that apply.
      </p>
      <p>On a shared machine a job close to the memory limit can take the node down with it. Leave room above the upper end of the range.</p>
    </Notice>
  );
}
