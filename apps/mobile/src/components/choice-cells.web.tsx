import { useId, type CSSProperties } from 'react';
import type { ChoiceCellsProps } from '@/components/choice-cells-props';
import { describedBy, FieldError } from '@/components/field-frame';
import { Text } from '@/components/text';
import { cssType } from '@/constants/css-type';
import { radius, space, target } from '@/constants/layout';
import type { Colours } from '@/constants/colours';
import { useTheme } from '@/hooks/use-theme';

const unseen: CSSProperties = {
  position: 'absolute',
  inset: 0,
  margin: 0,
  width: '100%',
  height: '100%',
  opacity: 0,
  cursor: 'pointer',
};

const cellLook = (c: Colours, chosen: boolean, minHeight: number): CSSProperties => ({
  ...cssType('body', chosen ? 'semibold' : 'regular'),
  position: 'relative',
  cursor: 'pointer',
  boxSizing: 'border-box',
  minHeight,
  padding: space.small,
  display: 'flex',
  flexDirection: 'column',
  alignItems: 'center',
  justifyContent: 'center',
  textAlign: 'center',
  borderRadius: radius.control,
  border: `2px solid ${chosen ? c.water : c.edge}`,
  backgroundColor: chosen ? c.waterTint : c.sheet,
  color: c.ink,
  overflowWrap: 'anywhere',
});

/** The cells behind `ChoiceGrid` and `ManyChoiceGrid`: the browser's own radio buttons and checkboxes, laid over each cell. */
export function ChoiceCells({ label, hint, error, kind, cells, columns = 3, bank = true }: ChoiceCellsProps) {
  const id = useId();
  const { colours } = useTheme();
  const least = `max(${String(kind === 'radio' && columns > 3 ? 72 : 92)}px, calc((100% - ${String((columns - 1) * space.small)}px) / ${String(columns)}))`;
  return (
    <fieldset
      aria-describedby={describedBy({ id, hint, error })}
      style={{ border: 'none', margin: 0, padding: 0, minWidth: 0 }}
    >
      <legend
        style={{ ...cssType('small', 'semibold'), color: colours.ink, padding: 0, marginBottom: space.hair }}
      >
        {label}
      </legend>
      {hint ? (
        <div style={{ marginBottom: space.small }}>
          <Text nativeID={`${id}-hint`} size="small" tone="inkSoft">
            {hint}
          </Text>
        </div>
      ) : null}
      <div
        style={{
          display: 'grid',
          gap: space.small,
          gridTemplateColumns: `repeat(auto-fill, minmax(${least}, 1fr))`,
        }}
      >
        {cells.map((cell) => (
          <label
            key={cell.key}
            className="choice"
            style={cellLook(colours, cell.chosen, bank ? target.bank : target.plain)}
          >
            <input
              type={kind}
              name={id}
              value={cell.key}
              checked={cell.chosen}
              onChange={cell.choose}
              style={unseen}
            />
            <span>{cell.label}</span>
            {cell.note ? (
              <span style={{ ...cssType('tiny'), color: colours.inkSoft }}>{cell.note}</span>
            ) : null}
          </label>
        ))}
      </div>
      {error ? <FieldError id={id} words={error} /> : null}
    </fieldset>
  );
}
