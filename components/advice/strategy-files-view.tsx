import { CodeBlock } from "@/components/ui/code-block";
import { Notice } from "@/components/ui/notice";
import type { StrategyFiles } from "@/lib/api/contract/cases";

/** How to run a strategy: options for PETSc with the calling lines they need, the same as a recipe in prose, and a batch script. */
export function StrategyFilesView({ files, prefix }: { files: StrategyFiles; prefix: string }) {
  const { options, recipe, batchScript } = files;
  return (
    <div className="grid grid-cols-1 gap-5">
      <div className="grid items-start gap-5 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        {options.kind === "petsc" ? (
          <CodeBlock title={options.filename} code={options.text} fileName={`${prefix}${options.filename}`} />
        ) : (
          <Notice title="Recipe only">{options.reason}</Notice>
        )}
        <section aria-label="The same in prose">
          <h4 className="mb-1.5 text-sm font-semibold">The same in prose</h4>
          <ol className="grid list-decimal gap-1.5 pl-5 text-sm">
            {recipe.map((step, index) => (
              <li key={index}>{step}</li>
            ))}
          </ol>
        </section>
      </div>
      {options.kind === "petsc" && options.callingLines !== null && <CodeBlock title="Calling lines that go with it" code={options.callingLines} />}
      <CodeBlock title={batchScript.filename} code={batchScript.text} fileName={batchScript.filename} />
    </div>
  );
}
