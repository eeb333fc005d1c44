/** What the service is, shown by one call and its answer. */
import { headers } from 'next/headers';
import Link from 'next/link';
import { calculationPath, groups } from '@/lib/solvers/calculation';
import { calculations, methods } from '@/lib/solvers/registry';
import { declaredCounts } from '@/lib/verification/record';
import { ButtonLink } from './_components/button';
import { CodeBlock } from './_components/code-block';
import { Figure, Figures } from './_components/figure';
import { PairRule } from './_components/pair-rule';
import { PublicFrame } from './_components/public-frame';
import { engineeringComplex, formatCount, formatPolar, formatQuantity, significant } from './_format/numbers';
import { curlCommand } from './_format/curl';
import { groupTitles } from './_format/group-titles';
import { sentence } from './_format/sentence';
import { complexAt, exampleCall, type ExampleCall } from './_front/example-call';
import { ImpedanceDrawing } from './_front/impedance-drawing';

export default async function FrontPage() {
  const origin = await ownOrigin();
  const call = exampleCall();
  return (
    <PublicFrame>
      <div className="mt-12 mb-8">
        <h1 className="max-w-[24ch] text-[30px] leading-[1.14] font-semibold tracking-[-0.022em] text-balance sm:text-display">Transmission-line numbers you can put your name to</h1>
        <p className="mt-4 max-w-measure text-[16px] text-ash">
          Linewright computes impedance, loss, reflection and response of transmission lines over HTTP. Every number comes back with the method that made it, that method’s published source, its range and its accuracy, and every call stays in a log you can point to.
        </p>
        <div className="mt-6 flex flex-wrap gap-3">
          <ButtonLink href="/sign-in" variant="primary">
            Sign in
          </ButtonLink>
          <ButtonLink href="/reference">API reference</ButtonLink>
        </div>
      </div>
      {call && <Shown call={call} origin={origin} />}
      <Catalogue />
      <Proof />
      <Promises />
    </PublicFrame>
  );
}

function Shown({ call, origin }: { readonly call: ExampleCall; readonly origin: string }) {
  const { result, methods, input, name } = call;
  const { frequency_hz: frequencies, input_impedance_ohm: impedance } = result;
  // A point near the middle, where both traces are away from the edges.
  const marked = Math.floor(frequencies.length * 0.47);
  return (
    <section aria-labelledby="one-call">
      <PairRule />
      <div className="-mx-5 mt-5 overflow-x-auto px-5 sm:mx-0 sm:px-0" tabIndex={0} role="region" aria-label="Drawing of the answer">
        <ImpedanceDrawing frequencies={frequencies} real={impedance.re} imaginary={impedance.im} marked={marked} />
      </div>
      <div className="mt-7 grid gap-x-11 gap-y-8 lg:grid-cols-2">
        <div className="min-w-0">
          <h2 id="one-call" className="text-heading font-semibold">
            One call
          </h2>
          <p className="mb-2.5 text-small text-ash">{name}</p>
          <CodeBlock code={curlCommand(origin, call.path, input)} label="command" />
        </div>
        <div className="min-w-0">
          <h2 className="text-heading font-semibold">Its answer</h2>
          <p className="mb-2.5 text-small text-ash">
            Computed as this page was drawn; here at <span className="font-mono text-[13px] font-medium text-ink">{formatQuantity(frequencies[marked], 'Hz', 5)}</span> of {frequencies.length} frequencies.
          </p>
          <Answer result={result} index={marked} />
          <ul className="mt-5 border-t border-rule">
            {methods.map(({ method, inRange }) => (
              <li key={method.id} className="border-b border-rule py-2.5 text-small">
                <span className="flex flex-wrap justify-between gap-x-5">
                  <Link href={`/methods/${method.id}`} prefetch={false} className="font-[550] hover:text-copper hover:underline hover:underline-offset-3">
                    {method.title}
                  </Link>
                  <span className={inRange ? 'text-patina' : 'text-ochre'}>{inRange ? 'in range' : 'out of range'}</span>
                </span>
                <span className="block text-ash">
                  {sentence(method.source)} {sentence(method.range)} Accuracy: {sentence(method.accuracy, false)}
                </span>
              </li>
            ))}
          </ul>
        </div>
      </div>
    </section>
  );
}

function Answer({ result, index }: { readonly result: ExampleCall['result']; readonly index: number }) {
  const impedance = engineeringComplex(complexAt(result.input_impedance_ohm, index), 'ohm');
  const reflection = complexAt(result.reflection_at_reference, index);
  const polar = reflection && formatPolar(reflection);
  return (
    <Figures className="grid! w-fit grid-cols-2">
      <Figure label="Input impedance" value={impedance.value} unit={impedance.unit} />
      {polar && <Figure label="Reflection" value={polar.magnitude} unit={polar.angle} />}
      <Figure label="VSWR" value={significant(result.vswr[index])} />
      <Figure label="Return loss" value={significant(result.return_loss_db[index])} unit="dB" />
    </Figures>
  );
}

function Catalogue() {
  return (
    <section aria-labelledby="catalogue" className="mt-14">
      <h2 id="catalogue" className="text-heading font-semibold">
        What it computes
      </h2>
      <PairRule className="mt-2.5 mb-5" />
      <div className="grid gap-8">
        {groups.map((group) => (
          <div key={group} className="grid gap-x-8 gap-y-2 sm:grid-cols-[9rem_1fr]">
            <h3 className="font-[550]">{groupTitles[group]}</h3>
            <dl className="grid gap-x-8 gap-y-3 lg:grid-cols-2">
              {calculations
                .filter((calculation) => calculation.group === group)
                .map((calculation) => (
                  <div key={calculationPath(calculation)}>
                    <dt className="text-small font-[550]">{calculation.title}</dt>
                    <dd className="text-small text-ash">{calculation.summary}</dd>
                  </div>
                ))}
            </dl>
          </div>
        ))}
      </div>
    </section>
  );
}

/** Counted, not computed: the first look at the front page waits for no check. */
function Proof() {
  const { checks, values } = declaredCounts();
  return (
    <section aria-labelledby="proof" className="mt-14">
      <h2 id="proof" className="text-heading font-semibold">
        Proof, not trust
      </h2>
      <PairRule className="mt-2.5 mb-5" />
      <div className="flex flex-wrap items-start justify-between gap-x-11 gap-y-5">
        <div className="max-w-measure">
          <p>
            Values from textbooks, standards and references of 30 digits, each made by another route than the engine’s, are computed again by the engine that answers you, and shown beside what was published: the digits, the difference, and what is allowed.
          </p>
          <div className="mt-5 flex flex-wrap gap-3">
            <ButtonLink href="/verification">Verification</ButtonLink>
            <ButtonLink href="/methods">Methods</ButtonLink>
          </div>
        </div>
        <Figures>
          <Figure label="Checks" value={formatCount(checks)} />
          <Figure label="Published values" value={formatCount(values)} />
          <Figure label="Methods" value={formatCount(methods.length)} />
        </Figures>
      </div>
    </section>
  );
}

const promises = [
  ['Method', 'Each answer names the methods it rests on: published source, equation, range and stated accuracy, and a warning where the input lies outside.'],
  ['Record', 'Each call has an id, the engine’s version and digests of input and result. The same request on the same version gives the same bytes.'],
  ['Refusals', 'Every wrong field is named at once, with its place in the request and what to do. A refused input costs nothing.'],
  ['Limits', 'Keys carry scopes, a monthly quota, a burst limit, an expiry and allowed networks; revoking one holds from the next request on.'],
] as const;

function Promises() {
  return (
    <section aria-labelledby="promises" className="mt-14">
      <h2 id="promises" className="text-heading font-semibold">
        What comes with every number
      </h2>
      <PairRule className="mt-2.5 mb-5" />
      <dl className="grid gap-x-11 gap-y-5 sm:grid-cols-2">
        {promises.map(([title, text]) => (
          <div key={title}>
            <dt className="font-[550]">{title}</dt>
            <dd className="mt-0.5 text-small text-ash">{text}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-6 text-small text-ash">
        What each refusal means is on the{' '}
        <Link href="/problems" className="link">
          pages of problems
        </Link>
        .
      </p>
    </section>
  );
}

/** As the reader reached us, so that the command works where it is pasted. */
async function ownOrigin(): Promise<string> {
  if (process.env.PUBLIC_URL) return process.env.PUBLIC_URL.replace(/\/$/, '');
  const host = (await headers()).get('host') ?? 'localhost:3000';
  return `http://${host}`;
}
