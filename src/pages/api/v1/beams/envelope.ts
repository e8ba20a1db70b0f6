import { requirePermission } from '@/features/account/permission';
import { envelopeAnswer, envelopeDocument, envelopeRequest } from '@/features/beam/envelope';
import { endpoint } from '@/http/endpoint';
import { invalid } from '@/lib/app-error';

export const POST = endpoint(
  {
    summary: 'Envelope of any beam over combinations and patterns of its loads',
    description: `Exact per quantity and place: what always acts, and of the patterned groups only the spans that are adverse; each value names its combination and the spans loaded. No envelope is a real arrangement of loads: \`arrangements\` gives those that govern, each as beams/solve answers it.

Every load has a group. A group without a factor in a combination does not act there; a factor for a group without loads has no effect. Several patterned groups load the same spans together. Pattern spans run between vertical supports, overhangs included, from the left; line loads and curvatures are cut there, and a load or couple on a support belongs to the span at its left, on the first support at the left end to the first span. The supports' own movements act in every combination, once and unfactored; they are in no group.

A support with \`lift_off\` cannot pull. Then each combination with each set of loaded spans is solved anew, and every value says which supports the beam is off; \`groups\` remain those of the beam held at every support, which cannot be added up.`,
    body: envelopeRequest,
    answer: envelopeAnswer,
  },
  (_, { user, body }) => {
    requirePermission(user, 'beam.solve');
    const outcome = envelopeDocument(body);
    if (!outcome.ok) throw invalid(outcome.errors);
    return outcome.answer;
  },
);
