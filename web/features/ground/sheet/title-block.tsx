import { classNames } from '#web/lib/class-names.ts'
import type { TitleFact } from './title-facts.ts'

/** The title block along the bottom of the sheet. Narrow, the row scrolls and the essential facts come first. */
export function TitleBlock({ facts }: { facts: readonly TitleFact[] }) {
  return (
    <div role="region" aria-label="Title block" tabIndex={0} className="overflow-x-auto border-t-2 border-ink bg-raised -outline-offset-3">
      <dl className="m-0 flex lg:min-h-[72px]">
        {facts.map(({ key, label, value, of, bad, essential }, index) => (
          <div
            key={key}
            className={classNames(
              'shrink-0 px-[18px] pt-3 pb-[10px] whitespace-nowrap max-xl:border-r max-xl:border-rule-2 max-xl:px-3 max-lg:pt-2 max-lg:pb-1',
              index < facts.length - 1 && 'border-r border-rule-2',
              !essential && 'max-xl:order-last',
            )}
          >
            <dt className="cap">{label}</dt>
            <dd className={classNames('m-0 mt-1 text-value leading-[1.25] font-semibold', bad === true && 'text-bad', 'max-lg:text-[16px]')}>
              {value}
              {of !== undefined && (
                <small className="text-[12px] font-medium text-ink-2">
                  {value !== '' && ' '}
                  {of}
                </small>
              )}
            </dd>
          </div>
        ))}
      </dl>
    </div>
  )
}
