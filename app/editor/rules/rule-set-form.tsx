import { useState } from 'react'
import { Form } from 'react-router'
import { bearings } from '#app/domain/rules/bearings.ts'
import { bearingSchema, mostArticles } from '#app/domain/rules/rule-set.ts'
import type { TypedArticle, TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { Button } from '#app/components/button.tsx'
import { ErrorSummary } from '#app/components/error-summary.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'

interface RuleSetFormProps {
  /** As it was when the form opened. */
  readonly typed: TypedRuleSet
  /** That it is changed from; null for a new one. */
  readonly revision: string | null
  readonly errors: Readonly<Record<string, string>>
  readonly sending: boolean
}

const rules = bearingSchema.options.map((value) => ({ value, label: bearings[value].label }))
const sources = [
  { value: 'read', label: 'read' },
  { value: 'from memory', label: 'from memory' },
]
const blank: TypedArticle = { article: '', rule: 'clearance-above', figure: '', note: '', source: 'read' }

/** The fields of a rule set with its articles as rows. What was typed stays when the server refuses it. */
export function RuleSetForm({ typed, revision, errors, sending }: RuleSetFormProps) {
  const [rows, setRows] = useState(() => typed.articles.map((article, key) => ({ key, article })))
  const text = (name: 'name' | 'place' | 'edition', label: string) => (
    <TextField id={name} name={name} label={label} defaultValue={typed[name]} error={errors[name]} />
  )
  const problems = Object.entries(errors).map(([id, error]) => ({ id, error, label: labelOf(id) }))
  return (
    <Form method="post" noValidate className="max-w-5xl">
      <ErrorSummary errors={problems} />
      <input type="hidden" name="revision" value={revision ?? ''} />
      <input type="hidden" name="count" value={rows.length} />
      <div className="grid gap-x-5 gap-y-3 tablet:grid-cols-3">
        {text('name', 'Name')}
        {text('edition', 'Edition')}
        {text('place', 'Place where it holds')}
      </div>
      <h2 className="mt-6 text-sm font-strong">Articles</h2>
      <p className="text-ink-2">
        A clearance or height counts where it asks more than the manual. Distances as in 0.9 m or 36 in.
      </p>
      <ol className="mt-2">
        {rows.map(({ key, article }, i) => (
          <ArticleRow
            key={key}
            index={i}
            article={article}
            errors={errors}
            onRemove={() => setRows(rows.filter((row) => row.key !== key))}
          />
        ))}
      </ol>
      <div className="mt-3 flex flex-wrap gap-3 border-t border-rule pt-3">
        <Button
          icon="plus"
          disabled={rows.length >= mostArticles}
          onClick={() => setRows([...rows, { key: Math.max(0, ...rows.map((row) => row.key + 1)), article: blank }])}
        >
          Article
        </Button>
        <Button type="submit" kind="primary" disabled={sending}>
          {revision === null ? 'Keep rule set' : 'Keep as a new revision'}
        </Button>
      </div>
    </Form>
  )
}

interface ArticleRowProps {
  readonly index: number
  readonly article: TypedArticle
  readonly errors: Readonly<Record<string, string>>
  readonly onRemove: () => void
}

function ArticleRow({ index, article, errors, onRemove }: ArticleRowProps) {
  const [rule, setRule] = useState(article.rule)
  const chosen = bearingSchema.safeParse(rule)
  const field = (name: keyof TypedArticle, label: string) => {
    const path = `articles.${index}.${name}`
    return { id: path, name: path, label, defaultValue: article[name], error: errors[path] }
  }
  const rulePath = `articles.${index}.rule`
  return (
    <li className="grid items-end gap-x-3 gap-y-2 border-t border-rule py-3 tablet:grid-cols-[6rem_minmax(0,1.8fr)_7rem_minmax(0,1.8fr)_8rem_auto]">
      <TextField {...field('article', 'Article')} />
      <SelectField
        id={rulePath}
        name={rulePath}
        label="Bears on"
        error={errors[rulePath]}
        options={rules}
        value={rule}
        onChange={(event) => setRule(event.target.value)}
      />
      <TextField {...field('figure', 'Figure')} unit={chosen.success ? bearings[chosen.data].unit : 'm'} />
      <TextField {...field('note', 'Note')} />
      <SelectField {...field('source', 'Its text was')} options={sources} />
      <Button kind="text" onClick={onRemove} aria-label={`Remove article ${index + 1}`}>
        Remove
      </Button>
    </li>
  )
}

/** "articles.2.figure" → "Article 3, figure". */
function labelOf(path: string): string {
  const [first = '', index, name] = path.split('.')
  if (first !== 'articles' || index === undefined) return first.charAt(0).toUpperCase() + first.slice(1)
  return `Article ${Number(index) + 1}${name ? `, ${name}` : ''}`
}
