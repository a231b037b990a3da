import { ruleSetSchema, type RuleSet } from '#app/domain/rules/rule-set.ts'

const invented = 'Invented for the demonstration; no such article exists.'

/** The demonstration's one rule set: place, edition and every article are invented and say so. */
export const demoRuleSet = (): RuleSet =>
  ruleSetSchema.parse({
    name: 'Demo district',
    place: 'an invented district (demonstration only)',
    edition: 'edition 1',
    articles: [
      { article: 'D 4.1', rule: 'clearance-front-of-beam', figure: 1.2, unit: 'm', note: invented, source: 'read' },
      { article: 'D 4.2', rule: 'mounting-height', figure: 2, unit: 'm', note: invented, source: 'read' },
      { article: 'D 5.3', rule: 'sprinkler-distance', figure: 0.9, unit: 'm', note: invented, source: 'read' },
      { article: 'D 5.4', rule: 'lamp-distance', figure: 0.5, unit: 'm', note: invented, source: 'from memory' },
    ],
  })
