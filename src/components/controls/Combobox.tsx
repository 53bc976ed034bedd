import { useId, type ReactNode } from 'react'
import {
  Button as AriaButton,
  ComboBox,
  FieldError as AriaFieldError,
  Input,
  Label,
  ListBox,
  ListBoxItem,
  Popover,
  Text,
} from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import { isWrong, type FieldParts } from './Field'

export interface ComboboxItem {
  id: string
  /** What is searched and what the box shows once it is chosen. */
  text: string
  /** What the list shows, where it is more than the text. */
  content?: ReactNode
}

export interface ComboboxProps extends FieldParts {
  items: readonly ComboboxItem[]
  /** The id of the chosen item; null for none. */
  value: string | null
  onChange: (id: string | null) => void
  /** Takes words that are no item's: what was typed is handed to `onText`. */
  onText?: (text: string) => void
  text?: string
  placeholder?: string
  disabled?: boolean
}

/** One of many, found by typing. Arrow keys and Enter choose; Escape closes and keeps what was there. */
export function Combobox(props: ComboboxProps) {
  const { t } = useTranslation('controls')
  const id = useId()
  return (
    <ComboBox
      className="field"
      defaultItems={props.items}
      selectedKey={props.value}
      onSelectionChange={(key) => props.onChange(key === null ? null : String(key))}
      {...(props.onText !== undefined && {
        allowsCustomValue: true,
        inputValue: props.text ?? '',
        onInputChange: props.onText,
      })}
      menuTrigger="focus"
      isInvalid={isWrong(props.error)}
      isDisabled={props.disabled}
      allowsEmptyCollection
    >
      <Label className={props.hideLabel === true ? 'visually-hidden' : undefined}>
        {props.label}
        {props.optional === true && <span className="font-normal"> {t('optional')}</span>}
      </Label>
      {props.description !== undefined && (
        <Text slot="description" className="note">
          {props.description}
        </Text>
      )}
      <div className={isWrong(props.error) ? 'input err' : 'input'}>
        <Input id={id} placeholder={props.placeholder} />
        <AriaButton className="in-field arrow" aria-label={t('showList')} />
      </div>
      <AriaFieldError className="field-error" elementType="p">
        {props.error}
      </AriaFieldError>
      <Popover className="popover" offset={2}>
        <ListBox<ComboboxItem>
          className="list-box"
          renderEmptyState={() => <p className="note px-3 py-2">{t('nothingFound')}</p>}
        >
          {(item) => (
            <ListBoxItem className="list-item" id={item.id} textValue={item.text}>
              {item.content ?? item.text}
            </ListBoxItem>
          )}
        </ListBox>
      </Popover>
    </ComboBox>
  )
}
