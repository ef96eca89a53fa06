import { CustomChart, LineChart, ScatterChart } from 'echarts/charts'
import { GridComponent, MarkAreaComponent, TooltipComponent } from 'echarts/components'
import { use } from 'echarts/core'
import { SVGRenderer } from 'echarts/renderers'

// Only what the charts use: the rest of the package stays out of what the browser loads.
use([CustomChart, LineChart, ScatterChart, GridComponent, MarkAreaComponent, TooltipComponent, SVGRenderer])
