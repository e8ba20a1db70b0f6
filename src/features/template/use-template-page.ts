import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { UNIT_SYSTEMS } from '@/engine/quantity';
import { writeValues } from './address';
import type { TemplateEvaluation } from './evaluate';
import { evaluatePage, type PageValues, type TemplatePageData } from './page';
import { type Entry, entryText, type RawValue, readEntry, toRaw } from './raw';
import { type Release, releaseKey } from './release';
import { useRestedValue } from './use-live';

/** The last values that gave a result, and what they gave. */
interface Good {
  readonly values: PageValues;
  readonly evaluation: TemplateEvaluation;
}

const eiEntry = ({ system }: TemplatePageData, text: string): Entry =>
  readEntry(text, 'bending_stiffness', UNIT_SYSTEMS[system].bending_stiffness.unit);

/** What a person has set on a template's page, the result of it, and the address that says it. */
export function useTemplatePage(data: TemplatePageData) {
  const { template, system } = data;
  const ownEi = useMemo(() => eiEntry(data, template.stiffness.default_ei), [data, template]);
  const [values, setValues] = useState(
    (): PageValues => ({
      raw: toRaw(template, data.parameters, { system }),
      ei: data.ei === '' ? ownEi : eiEntry(data, data.ei),
      section: data.section,
    }),
  );
  const [releases, setReleases] = useState(data.releases);
  const outcome = useMemo(() => evaluatePage(template, values, system), [template, values, system]);
  const good = useGood(data, values, outcome.ok ? outcome.evaluation : null);

  const set = useCallback((change: Partial<PageValues>) => setValues((now) => ({ ...now, ...change })), []);
  const setParameter = useCallback(
    (symbol: string, value: RawValue) =>
      setValues((now) => ({ ...now, raw: { ...now.raw, [symbol]: value } })),
    [],
  );
  const putBack = useCallback(
    (symbol: string | null) => {
      const last = good.values;
      const value = symbol === null ? undefined : last.raw[symbol];
      if (symbol === null || value === undefined) setValues(last);
      else setParameter(symbol, value);
    },
    [good, setParameter],
  );
  const restore = useCallback(() => {
    setValues({ raw: toRaw(template, {}, { system }), ei: ownEi, section: null });
    setReleases(null);
  }, [template, system, ownEi]);

  const query = useMemo(() => queryOf(data, values, releases), [data, values, releases]);
  useAddress(query);
  return { values, releases, setReleases, outcome, good, set, setParameter, putBack, restore, query };
}

/** The defaults stand in until something else has been good. */
function useGood(data: TemplatePageData, values: PageValues, evaluation: TemplateEvaluation | null): Good {
  const [first] = useState(() => (evaluation ? { values, evaluation } : atDefaults(data)));
  const last = useRef(first);
  useEffect(() => {
    if (evaluation) last.current = { values, evaluation };
  }, [values, evaluation]);
  return evaluation ? { values, evaluation } : last.current;
}

/** A template that was checked has a result at its defaults; one that was not is our mistake. */
class NoResultAtDefaults extends Error {
  constructor(slug: string, why: string) {
    super(`${slug} has no result at its defaults: ${why}`);
    this.name = 'NoResultAtDefaults';
  }
}

function atDefaults(data: TemplatePageData): Good {
  const { template, system } = data;
  const ei = eiEntry(data, template.stiffness.default_ei);
  const values = { raw: toRaw(template, {}, { system }), ei, section: null };
  const outcome = evaluatePage(template, values, system);
  if (outcome.ok) return { values, evaluation: outcome.evaluation };
  throw new NoResultAtDefaults(template.slug, outcome.errors[0]?.message ?? '');
}

function queryOf(
  { template, system }: TemplatePageData,
  { raw, ei, section }: PageValues,
  releases: readonly Release[] | null,
): string {
  const said = entryText(ei, 'bending_stiffness');
  const text = said === template.stiffness.default_ei || section ? '' : said;
  const stiffness = {
    ei: text,
    section: section?.values.designation ?? '',
    table: section?.table ?? '',
    material: section?.material ?? '',
  };
  const query = writeValues(template, raw, stiffness, { system });
  if (releases) query.set('release', releaseKey(releases));
  return query.toString();
}

/** The address follows at rest, so that it can be sent to somebody; nothing is loaded. */
function useAddress(query: string): void {
  const rested = useRestedValue(query, 300);
  const isFirst = useRef(true);
  useEffect(() => {
    if (isFirst.current) {
      isFirst.current = false;
      return;
    }
    history.replaceState(history.state, '', rested === '' ? location.pathname : `?${rested}`);
  }, [rested]);
}
