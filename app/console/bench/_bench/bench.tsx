'use client';

import { useEffect, useRef, useState, type KeyboardEvent, type SyntheticEvent } from 'react';
import { FormProvider } from 'react-hook-form';
import { Button } from '@/app/_components/button';
import { PageTitle } from '@/app/_components/page-title';
import { calculationPath, type Calculation } from '@/lib/solvers/calculation';
import { findCalculation } from '@/lib/solvers/registry';
import { useBenchForm } from '../_form/bench-form';
import { ExplainSwitch } from '../_form/explain';
import { SectionView } from '../_form/section-view';
import { sectionsOf } from '../_form/sections';
import { decodeInput, encodeInput } from '../_link/input-in-link';
import { AnswerColumn } from './answer-column';
import { ExampleSelect, type Origin } from './example-select';
import { useCall } from './use-call';
import { useCurrentInput } from './use-current-input';

/** The registry holds functions, which no server hands to a page; the page finds its calculation itself. */
export function Bench({ group, id }: { readonly group: string; readonly id: string }) {
  const calculation = findCalculation(group, id);
  return calculation ? <CalculationBench calculation={calculation} /> : null;
}

function CalculationBench({ calculation }: { readonly calculation: Calculation }) {
  const { field, form, load } = useBenchForm(calculation);
  const [origin, setOrigin] = useState<Origin>(0);
  const current = useCurrentInput(calculation, field, form);
  const call = useCall(calculation, field, form);
  const opened = useRef(false);
  const answer = useRef<HTMLElement>(null);

  useEffect(() => {
    // Once: later changes of the fragment are this page's own.
    if (opened.current) return;
    opened.current = true;
    if (window.location.hash === '') return;
    void decodeInput(window.location.hash).then((input) => {
      if (input === undefined) return setOrigin('unreadable link');
      load(input);
      setOrigin('link');
    });
  }, [load]);

  useEffect(() => {
    // Below the form the answer would arrive out of sight.
    if (call.answered && window.matchMedia('(width < 64rem)').matches) answer.current?.scrollIntoView({ block: 'start' });
  }, [call.answered]);

  async function send({ input }: { input: unknown }) {
    window.history.replaceState(null, '', `#${await encodeInput(input)}`);
    await call.send(input);
  }

  function run(event?: SyntheticEvent) {
    void form.handleSubmit(send)(event);
  }

  function onKeyDown(event: KeyboardEvent) {
    if (event.key !== 'Enter' || !(event.ctrlKey || event.metaKey)) return;
    event.preventDefault();
    run();
  }

  function loadExample(index: number) {
    load(calculation.examples[index].input);
    setOrigin(index);
  }

  return (
    <>
      <PageTitle title={calculation.title}>{calculation.summary}</PageTitle>
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-x-10 gap-y-10 lg:grid-cols-[352px_minmax(0,1fr)]">
        <FormProvider {...form}>
          <form noValidate aria-label={calculation.title} onSubmit={run} onKeyDown={onKeyDown} className="[&_:is(input,select,textarea)]:scroll-mb-24">
            <ExplainSwitch>
              {(explainSwitch) => (
                <>
                  <ExampleSelect calculation={calculation} origin={origin} onChoose={loadExample} explainSwitch={explainSwitch} />
                  <div className="mt-6 space-y-6">
                    {sectionsOf(field).map((section) => (
                      <SectionView key={section.legend} section={section} />
                    ))}
                  </div>
                </>
              )}
            </ExplainSwitch>
            <div className="sticky bottom-0 mt-4 flex flex-wrap items-center gap-x-3 gap-y-1 border-t border-rule bg-paper py-3">
              <Button type="submit" busy={call.state === 'waiting'}>
                Calculate
              </Button>
              <small className="text-fine text-ash">
                {current.cost}
                <span className="hidden sm:inline"> · Ctrl Enter</span>
              </small>
            </div>
          </form>
        </FormProvider>
        <AnswerColumn ref={answer} calculation={calculation} path={calculationPath(calculation)} call={call} current={current.input} onRetry={() => run()} />
      </div>
    </>
  );
}
