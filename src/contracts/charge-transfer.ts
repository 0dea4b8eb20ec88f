import * as z from 'zod';
import { route } from './route.ts';

export const ChargeTransferInput = z
  .strictObject({
    element: z.string().min(1).max(3),
    oxidationState: z.number().int().min(-4).max(9),
    geometry: z.string().min(1).max(20).describe('Polyhedral symbol'),
    ligands: z.array(z.string().min(1).max(60)).min(1).max(24).describe('Abbreviations or formulae'),
    spin: z
      .enum(['low', 'intermediate', 'high'])
      .optional()
      .describe('Unless told: the tabulated one, else high in T-4 and low elsewhere'),
    delta: z.number().positive().max(100_000).optional().describe('cm⁻¹'),
    B: z.number().positive().max(2000).optional().describe('cm⁻¹'),
  })
  .meta({
    id: 'ChargeTransferInput',
    example: { element: 'Cr', oxidationState: 3, geometry: 'OC-6', ligands: ['Cl', 'NH3'] },
  });

export const ChargeTransferResult = z
  .looseObject({
    lmct: z.array(
      z.looseObject({
        ligand: z.string(),
        orbital: z.enum(['pi', 'sigma']),
        acceptor: z.string(),
        wavenumber: z.number().describe('cm⁻¹'),
        wavelength: z.number().nullable().describe('nm'),
        terms: z.looseObject({
          electronegativity: z.number(),
          field: z.number().nullable(),
          spinPairing: z.number().nullable(),
        }),
        usualError: z.number().describe('cm⁻¹'),
      }),
    ),
    mlct: z.array(z.looseObject({ ligand: z.string(), plausible: z.boolean(), reason: z.string() })),
    reasons: z.array(z.string()),
  })
  .meta({ id: 'ChargeTransferResult' });

export const chargeTransferRoutes = {
  deriveChargeTransfer: route({
    tag: 'Ligand field',
    who: 'signed-in',
    scope: 'read',
    status: 200,
    method: 'POST',
    limit: 20_000,
    path: '/api/derive/charge-transfer',
    summary: 'Charge-transfer bands: LMCT estimated, MLCT judged',
    body: ChargeTransferInput,
    answers: ChargeTransferResult,
  }),
};
