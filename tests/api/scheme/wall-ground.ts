import { addTestBlank } from './ground'
import type { Ctx } from '#server/services/ctx'
import { asOwner } from '../database'

/** Hangs many schemes on a workshop's wall at once, each with six zones of colours strewn over what paint can show. */
export async function manySchemes(ctx: Ctx, count: number): Promise<void> {
  const blankId = await addTestBlank(ctx, 'Strewn minnow')
  await asOwner(`insert into schemes (workshop_id, name, fish, blank_id, draft, saved_at, saved_by)
    select $1, 'Strewn ' || n, (array['Roach', 'Perch', 'Pike', 'Smelt'])[n % 4 + 1], $2, jsonb_build_object('stack', jsonb_build_array(jsonb_build_object('act', 'coat', 'coat',
      jsonb_build_object('name', 'Film ' || md5(n::text), 'mix', jsonb_build_object('parts', jsonb_build_array(jsonb_build_object('paintId', md5((n % 500)::text)::uuid))))))),
      now() - n * interval '1 minute', $3
    from generate_series(1, $4::int) n`, [ctx.workshopId, blankId, ctx.personId, count])
  await asOwner(`select setseed(.25)`)
  await asOwner(`insert into scheme_colours (workshop_id, scheme_id, side, zone, label, lightness, a, b)
    select workshop_id, id, 'draft', 'zone' || z, 'Zone ' || z, 100 * random(), 120 * random() - 60, 130 * random() - 60
    from schemes, generate_series(1, 6) z where workshop_id = $1`, [ctx.workshopId])
  await asOwner('update colour_fills set engine_version = \'strewn\' where workshop_id = $1', [ctx.workshopId])
  await asOwner('analyze schemes, scheme_colours, scheme_words, scheme_paints, colour_fills')
}
