import { useId } from 'react'
import { useTranslation } from 'react-i18next'
import { UNITS, unitCodes, type Unit, type UnitCode } from '../../../../shared/lib/units/units'
import { describedBy, Field, type FieldParts } from '../../../components/controls/Field'
import { useDraft } from '../draftStore'
import { useUnitWord } from './useUnitWord'

export interface UnitSelectProps extends FieldParts {
  value: UnitCode
  onChange: (unit: UnitCode) => void
}

const dimensions = [...new Set(unitCodes.map((code) => (UNITS[code] as Unit).dimension))]

/** A unit, under its kind of quantity. */
export function UnitSelect({ value, onChange, ...field }: UnitSelectProps) {
  const { t } = useTranslation('editing')
  const { readOnly } = useDraft()
  const word = useUnitWord()
  const id = useId()
  return (
    <Field id={id} {...field}>
      <div className="input sel">
        <select
          value={value}
          disabled={readOnly}
          onChange={(event) => onChange(event.target.value as UnitCode)}
          {...describedBy(id, field)}
        >
          {dimensions.map((dimension) => (
            <optgroup key={dimension} label={t(`dimension.${dimension}`)}>
              {unitCodes
                .filter((code) => (UNITS[code] as Unit).dimension === dimension)
                .map((code) => (
                  <option key={code} value={code}>
                    {word(code)}
                  </option>
                ))}
            </optgroup>
          ))}
        </select>
      </div>
    </Field>
  )
}
