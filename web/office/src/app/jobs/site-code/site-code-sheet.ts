import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type Job } from '#shared/jobs';
import { QrCode } from '../../pieces/qr-code';

/** The paper that hangs on site: the code, what it opens, and what to do when it does not. English and Spanish. */
@Component({
  selector: 'kb-site-code-sheet',
  imports: [QrCode],
  template: `
    <h2>{{ job().name }}</h2>
    <p class="place">{{ job().siteName }}@if (job().site.firstAid.address; as address) {<br />{{ address }}}</p>
    <kb-qr-code [text]="address()" [label]="'Code that opens the safety data sheets of ' + job().name" />
    <div class="both">
      <section>
        <h3>Safety data sheets</h3>
        <p>Scan to open every sheet of this job, the plan of the day and the emergency numbers. No account. Nothing can be changed.</p>
        <ol>
          <li>This code</li>
          <li>The lead's tablet</li>
          <li>The binder</li>
        </ol>
        <p><b>No signal?</b> A phone that opened it before opens it again. A first scan cannot: take the tablet, then the binder.</p>
      </section>
      <section lang="es">
        <h3>Hojas de datos de seguridad</h3>
        <p>Escanee para abrir todas las hojas de esta obra, el plan del día y los números de emergencia. Sin cuenta. No se puede cambiar nada.</p>
        <ol>
          <li>Este código</li>
          <li>La tableta del líder</li>
          <li>La carpeta</li>
        </ol>
        <p><b>¿Sin señal?</b> Un teléfono que ya lo abrió lo abre otra vez. El primer escaneo no: use la tableta, después la carpeta.</p>
      </section>
    </div>
    <p class="emergency"><b>Emergency / Emergencia: {{ job().site.firstAid.emergencyNumber ?? '911' }}</b></p>
    <p class="small">{{ organisationName() }}. Code of {{ madeOn() }}.</p>
  `,
  styles: `
    /* Paper: black on white whatever the scheme, so that what is seen is what is printed. */
    :host {
      display: flex;
      flex-direction: column;
      align-items: center;
      gap: 0.9rem;
      max-width: 44rem;
      padding: 1.75rem;
      color: #000;
      background: #fff;
      border: var(--kb-strip);
      text-align: center;
    }

    h2 {
      font-size: 1.75rem;
    }

    h3 {
      font-size: 1.1rem;
      color: #000;
    }

    kb-qr-code {
      width: min(19rem, 100%);
    }

    .both {
      display: grid;
      grid-template-columns: 1fr 1fr;
      gap: 0.5rem 2rem;
      text-align: start;

      section {
        display: flex;
        flex-direction: column;
        gap: 0.4rem;
      }
    }

    ol {
      padding-inline-start: 1.4rem;
      font-weight: 600;
    }

    .emergency {
      font-size: 1.25rem;
    }

    .small {
      font-size: var(--kb-small);
    }

    @media (max-width: 600px) {
      .both {
        grid-template-columns: 1fr;
      }
    }

    @media print {
      :host {
        max-width: none;
        border: 0;
        padding: 0;
        font-size: 12pt;
      }

      kb-qr-code {
        width: 3.6in;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SiteCodeSheet {
  readonly address = input.required<string>();
  readonly job = input.required<Job>();
  readonly organisationName = input.required<string>();
  readonly madeOn = input.required<string>();
}
