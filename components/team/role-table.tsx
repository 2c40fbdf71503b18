import type { Role } from "@/lib/auth/permissions";

export const roleMeanings: Record<Role, string> = {
  owner: "members, machines, deletion, keys, and all below",
  curator: "edits and publishes the rulebook, and all below",
  analyst: "cases and run reports, and all below",
  observer: "reads everything, changes nothing",
};

/** What each role may do. */
export function RoleTable() {
  return (
    <dl className="grid gap-1.5">
      {Object.entries(roleMeanings).map(([role, meaning]) => (
        <div key={role}>
          <dt className="inline font-semibold">{role}: </dt>
          <dd className="inline text-faint">{meaning}</dd>
        </div>
      ))}
    </dl>
  );
}
