import { CheckTraces } from './check';
import { extremeOf, placeOf } from './extreme';
import { Fields, groupWords } from './fields';
import { type Spot, station } from './lettered-beam';
import { constant, formula, renamed } from './node';
import type { SectionTraces } from './section';
import type { Key, Source, Subject, Trace } from './types';

type KeyOf<K extends Key['kind']> = Extract<Key, { kind: K }>;

/**
 * Where the numbers of a template or a member come from. A trace is worked when it is asked for, its parts when they are
 * read; what is worked for one number is kept for the next. A key that names nothing of the subject fails with
 * RangeError; a beam that cannot be solved, as solveBeam does.
 */
export class Traces {
  private readonly fields: Fields;

  constructor(subject: Subject) {
    this.fields = new Fields(subject);
  }

  why(key: Key): Trace {
    const trace = this.answer(key);
    const isOfGroup = 'acting' in key && key.acting.kind === 'group';
    return isOfGroup
      ? renamed(trace, { label: `${trace.label}, ${groupWords(key.acting.group)} alone` })
      : trace;
  }

  private answer(key: Key): Trace {
    const { fields } = this;
    switch (key.kind) {
      case 'reaction':
        return this.reaction(key);
      case 'value':
        return fields.of(key.acting).at(key.quantity, this.spot(key.x), key.side);
      case 'extreme':
        return extremeOf(fields, key);
      case 'place':
        return placeOf(fields, key.quantity, key.x, key.acting).trace;
      case 'contraflexure':
        return placeOf(fields, 'contraflexure', key.x, key.acting).trace;
      case 'redundant':
        return fields.all().redundants.value(key.index);
      case 'gap':
        return fields.all().redundants.gap(key.index);
      case 'step':
        return this.step(key);
      case 'flexibility':
        return fields.all().redundants.flexibility(key.row, key.column);
      case 'parameter':
        return this.parameters.symbol(key.symbol, this.parameters.whole);
      case 'load':
        return this.load(key);
      case 'closed form':
        return this.closedForm(key);
      case 'section':
        return this.section(key);
      case 'check':
        return this.check(key);
    }
  }

  /** A redundant, a movement of the released beam, a flexibility or a reaction, as the derivation's step finds it. */
  private step({ id }: KeyOf<'step'>): Trace {
    const { redundants, beam } = this.fields.all();
    const { unknowns, parts } = beam.worked;
    const isOf = (name: string) => id === name || id.startsWith(`${name}-`);
    for (const [i, { key }] of unknowns.entries()) {
      if (isOf(`redundant-${key}`)) return redundants.value(i);
      if (isOf(`gap-${key}`)) return redundants.gap(i);
      for (const [j, unit] of unknowns.entries())
        if (isOf(`flexibility-${key}-${unit.key}`) || isOf(`reciprocal-${key}-${unit.key}`))
          return redundants.flexibility(i, j);
    }
    const plain = (tex: string) => `equilibrium-${tex.replaceAll(/[^A-Za-z0-9]/g, '')}`;
    const action = parts.flatMap(({ actions }) => actions).find(({ tex }) => plain(tex) === id);
    if (action) return redundants.built.letter(action.tex);
    if (unknowns.length === 1) return redundants.value(0);
    throw new RangeError(`no single number stands behind the step ${id}`);
  }

  private get parameters() {
    return this.fields.givens.parameters;
  }

  private spot(x: number): Spot {
    const given = this.fields.givens.position(x);
    return { x, trace: given ?? station(x, 'Place on the beam') };
  }

  private reaction({ support, component, acting }: KeyOf<'reaction'>): Trace {
    const found = this.fields.of(acting).reaction(support, component);
    const isForce = component === 'vertical';
    return (
      found ??
      constant(
        {
          label: isForce ? 'Reaction' : 'Fixing moment',
          symbol: '',
          value: 0,
          measure: isForce ? 'reaction' : 'moment',
        },
        'The support carries nothing that way',
      )
    );
  }

  private load({ index }: KeyOf<'load'>): Trace {
    const { givens, subject } = this.fields;
    const keys = { point: 'p', line: 'w0', couple: 'm', curvature: 'kappa' } as const;
    const load = subject.beam.loads[index];
    if (!load) throw new RangeError(`the beam has no load ${index}`);
    return givens.loadSize(index, keys[load.kind]);
  }

  private closedForm({ id }: KeyOf<'closed form'>): Trace {
    const { template } = this.fields.subject;
    const result = template.results.find((one) => one.id === id);
    if (!result) throw new RangeError(`the template has no closed form ${id}`);
    const { name, tex, expression, source } = result;
    const trace = this.parameters.expression(expression, this.parameters.whole, {
      label: name,
      symbol: tex,
    });
    if (trace.how.kind !== 'formula') return trace;
    const how = { ...trace.how, method: 'closed form', sources: this.published(source) } as const;
    return formula(trace, how, () => trace.parts);
  }

  private published(id: string): Source[] {
    return this.fields.subject.template.sources
      .filter((one) => one.id === id)
      .map(({ publication, edition, table, case: place, from_memory }) => ({
        text: [publication, edition, table, place].filter((part) => part !== undefined).join(', '),
        fromMemory: from_memory,
      }));
  }

  private section({ property }: KeyOf<'section'>): Trace {
    if (property === 'ei') return this.parameters.stiffness();
    const section = this.ofSection();
    if (property === 'weight') return section.weight();
    return property === 'elastic_modulus' ? section.elasticModulus() : section.shearAreaAtAxis();
  }

  private check({ row, figure }: KeyOf<'check'>): Trace {
    const { criteria } = this.fields.subject;
    if (!criteria) throw new RangeError('nothing is judged without criteria');
    return new CheckTraces(this.fields, this.ofSection(), criteria)[figure](row);
  }

  private ofSection(): SectionTraces {
    const { section } = this.parameters;
    if (!section) throw new RangeError('the beam has no section');
    return section;
  }
}
