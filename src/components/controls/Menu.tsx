import type { ReactNode } from 'react'
import { Button as AriaButton, Menu as AriaMenu, MenuItem, MenuTrigger, Popover } from 'react-aria-components'

export interface MenuAction {
  id: string
  label: ReactNode
  /** For typing ahead, where the label is no plain text. */
  text?: string
  disabled?: boolean
  onAction: () => void
}

export interface MenuProps {
  /** What the button says; give `label` where that is only a mark. */
  children: ReactNode
  label?: string
  kind?: 'plain' | 'quiet'
  actions: readonly MenuAction[]
}

/** A button with acts that are seldom needed. Arrow keys move, letters jump, Escape closes. */
export function Menu({ children, label, kind = 'plain', actions }: MenuProps) {
  return (
    <MenuTrigger>
      <AriaButton className={kind === 'quiet' ? 'button quiet' : 'button'} aria-label={label}>
        {children}
      </AriaButton>
      <Popover className="popover" offset={2}>
        <AriaMenu
          className="list-box"
          disabledKeys={actions.filter((action) => action.disabled === true).map((action) => action.id)}
        >
          {actions.map((action) => (
            <MenuItem
              key={action.id}
              id={action.id}
              className="list-item"
              textValue={action.text ?? (typeof action.label === 'string' ? action.label : action.id)}
              onAction={action.onAction}
            >
              {action.label}
            </MenuItem>
          ))}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  )
}
