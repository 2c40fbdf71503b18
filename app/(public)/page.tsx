import Link from "next/link";
import { ExampleAdvice } from "@/components/landing/example-advice";
import { Caution } from "@/components/layout/caution";
import { SaddleFigure } from "@/components/layout/saddle-figure";
import { Margin, MarginFacts, MarginSection, Sheet } from "@/components/layout/sheet";
import { buttonVariants } from "@/components/ui/button";

const steps = [
  { title: "Describe the case", text: "About eight answers: element, degree, mesh, coefficient, machine, what your program can do. The sizes follow as you type." },
  { title: "Read the advice", text: "Eleven strategies in order of predicted time, each with its range, its memory, the rules that moved it, and what to fall back on." },
  { title: "Run it", text: "Take an options file to the cluster. Report the outcome by hand, by dropping the log, or from the batch job with a key." },
  { title: "Hold it to account", text: "Predicted against measured, per case and across the team: how often the first choice worked, how often it was the best, and what the misses cost." },
] as const;

export default function LandingPage() {
  return (
    <Sheet className="gap-12" margin={<LandingMargin />}>
      <div className="grid items-center gap-8 md:grid-cols-[minmax(0,1fr)_minmax(0,20rem)]">
        <div className="grid gap-5">
          <h1 className="text-4xl leading-[1.05] font-semibold tracking-tight sm:text-5xl">Which linear solver, for this mesh, on this machine</h1>
          <p className="max-w-measure text-lg">
            Saddlemark advises teams that solve saddle-point systems of mixed finite and virtual elements in 3D. It predicts time, memory and iterations before the job is queued, records
            what the cluster then did, and lets the team sharpen the rules from its own record.
          </p>
          <div className="flex flex-wrap gap-3">
            <Link href="/register" className={buttonVariants({ variant: "main", size: "large" })}>
              Create an account
            </Link>
            <Link href="/sign-in" className={buttonVariants({ size: "large" })}>
              Sign in
            </Link>
          </div>
        </div>
        <SaddleFigure className="mx-auto max-w-80" />
      </div>
      <ExampleAdvice />
      <section aria-labelledby="steps" className="grid gap-4">
        <h2 id="steps" className="text-xl font-semibold">
          How a team uses it
        </h2>
        <ol className="grid gap-x-8 gap-y-5 sm:grid-cols-2">
          {steps.map((step, index) => (
            <li key={step.title} className="grid grid-cols-[2rem_1fr] border-t border-hairline pt-3">
              <span aria-hidden className="figures font-heading text-2xl leading-none text-faint">
                {index + 1}
              </span>
              <div>
                <h3 className="text-base font-semibold">{step.title}</h3>
                <p className="text-sm text-faint">{step.text}</p>
              </div>
            </li>
          ))}
        </ol>
      </section>
      <Caution />
    </Sheet>
  );
}

function LandingMargin() {
  return (
    <Margin>
      <MarginSection title="The system">
        <p className="font-mono text-sm whitespace-pre">{"K = [ A  Bᵀ ]\n    [ B  0  ]"}</p>
        <p className="mt-2 text-faint">A: velocity mass block, symmetric positive definite. B: divergence block. K is symmetric and indefinite; its energy is a saddle, hence the contours.</p>
      </MarginSection>
      <MarginSection title="What is covered">
        <MarginFacts
          facts={[
            { name: "Elements", value: "VEM, RT, BDM" },
            { name: "Degree", value: "1 to 6" },
            { name: "Mesh families", value: "7" },
            { name: "Strategies", value: "11" },
          ]}
        />
      </MarginSection>
      <MarginSection title="Reading a bar">
        <p className="text-faint">The sign stands at the median. The bar spans the range that should hold the measured value in 80 of 100 runs. All bars share one log axis: the same length is the same factor.</p>
      </MarginSection>
      <MarginSection title="Roles">
        <p className="text-faint">Owners run the team, curators edit the rulebook, analysts file cases and runs, observers read. Teams never see each other.</p>
      </MarginSection>
    </Margin>
  );
}
